package roundwright.server.editions;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.HashSet;
import java.util.List;
import java.util.stream.IntStream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class BoardNamesTest {
  @ParameterizedTest
  @CsvSource({
    "Ines Halvorsen, 14, Ines Halvorsen",
    "Keʻalohi Kapuʻuwai, 14, Keʻalohi K.",
    "Nguyễn Thị Thảo Nguyên, 14, Nguyễn Thị T.",
    "Maximiliana-Wilhelmina Hohenlindenbaum von Rabensteiner, 14, Maximiliana H.",
    "Ai, 9, Ai",
    "Десислав Росенова, 9, Десислав",
    "Десислав Росенова, 14, Десислав",
    "風早川 つむぎ, 9, 風早川",
    "Wolfgangsiegbertreinhold, 9, Wolfgangs",
  })
  void aLongNameKeepsItsLeadingPartsAndAnInitial(String name, int letters, String fitted) {
    assertEquals(fitted, BoardNames.fit(name, letters, 1));
  }

  @Test
  void whoWouldReadAlikeGetsMoreLetters() {
    BoardNames names =
        BoardNames.of(List.of("Maren Thistlewood-Quarrier", "Maren Tidewellington-Ashgrove"));
    assertEquals(List.of("Maren Th.", "Maren Ti."), names.names());
  }

  @ParameterizedTest
  @CsvSource({
    "0, 2, 0",
    "16, 2, 0",
    "17, 3, 0",
    "24, 3, 0",
    "25, 4, 0",
    "32, 4, 0",
    "33, 5, 0",
    "40, 5, 0",
    "41, 5, 2"
  })
  void moreNamesMakeMoreColumnsAndNeverMoreRows(int people, int columns, int left) {
    List<String> all = IntStream.range(0, people).mapToObj(i -> "Person " + i).toList();
    BoardNames names = BoardNames.of(all);
    assertEquals(columns, names.columns());
    assertEquals(left, names.left());
    assertEquals(people - left, names.names().size());
    assertTrue(names.names().size() + (left > 0 ? 1 : 0) <= columns * 8);
    assertEquals(names.names().size(), new HashSet<>(names.names()).size());
  }

  @Test
  void namesThatAreTheSameStayTheSame() {
    List<String> same = List.of("Bartholomew Quarrier", "Bartholomew Quarrier");
    assertEquals(2, BoardNames.of(same).names().size());
  }
}
