package roundwright.scheduling;

import static com.tngtech.archunit.core.domain.JavaClass.Predicates.resideInAPackage;
import static com.tngtech.archunit.core.domain.JavaClass.Predicates.resideInAnyPackage;
import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.classes;
import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.noClasses;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.tngtech.archunit.core.domain.JavaClass;
import com.tngtech.archunit.core.domain.JavaClasses;
import com.tngtech.archunit.core.importer.ClassFileImporter;
import com.tngtech.archunit.core.importer.ImportOption;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.TreeMap;
import java.util.TreeSet;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/** Each package knows only those named after its arrow, and what they know. */
final class ArrowsTest {
  private static final String ROOT = "roundwright.scheduling";
  private static final Map<String, List<String>> ARROWS =
      new TreeMap<>(
          Map.ofEntries(
              Map.entry("cost", List.of()),
              Map.entry("model", List.of("cost")),
              Map.entry("file", List.of("model")),
              Map.entry("audit", List.of("model", "cost")),
              Map.entry("forecast", List.of("model")),
              Map.entry("flow", List.of()),
              Map.entry("core", List.of("model")),
              Map.entry("rules", List.of("core", "cost")),
              Map.entry("timetable", List.of("core", "rules", "forecast")),
              Map.entry("crewing", List.of("rules", "flow")),
              Map.entry("bounds", List.of("crewing", "flow")),
              Map.entry("repair", List.of("timetable", "crewing")),
              Map.entry("advice", List.of("crewing", "flow", "audit"))));

  private static final JavaClasses CLASSES =
      new ClassFileImporter()
          .withImportOption(ImportOption.Predefined.DO_NOT_INCLUDE_TESTS)
          .importPackages(ROOT);

  static Set<String> packages() {
    return ARROWS.keySet();
  }

  private static Set<String> known(String name) {
    Set<String> known = new TreeSet<>(Set.of(name));
    ARROWS.get(name).forEach(arrow -> known.addAll(known(arrow)));
    return known;
  }

  @Test
  void every_package_has_its_arrow() {
    Set<String> found = new TreeSet<>();
    for (JavaClass one : CLASSES) {
      if (!one.getPackageName().equals(ROOT)) {
        found.add(one.getPackageName().substring(ROOT.length() + 1));
      }
    }
    assertEquals(ARROWS.keySet(), found);
  }

  @ParameterizedTest
  @MethodSource("packages")
  void each_package_knows_only_what_its_arrows_allow(String name) {
    List<String> allowed = known(name).stream().map(known -> ROOT + "." + known).toList();
    String[] others =
        name.equals("file")
            ? new String[] {"java..", "com.fasterxml.jackson.."}
            : new String[] {"java.."};
    classes()
        .that()
        .resideInAPackage(ROOT + "." + name)
        .should()
        .onlyDependOnClassesThat(
            resideInAnyPackage(allowed.toArray(String[]::new)).or(resideInAnyPackage(others)))
        .check(CLASSES);
  }

  @Test
  void nothing_behind_the_door_knows_the_door() {
    noClasses()
        .that(resideInAPackage(ROOT + ".(*)"))
        .should()
        .dependOnClassesThat(resideInAPackage(ROOT))
        .check(CLASSES);
  }

  @Test
  void the_door_knows_no_library() {
    classes()
        .that()
        .resideInAPackage(ROOT)
        .should()
        .onlyDependOnClassesThat(resideInAnyPackage("java..", ROOT + ".."))
        .check(CLASSES);
  }

  @Test
  void there_are_classes_to_look_at() {
    assertTrue(CLASSES.size() > 50, "Only " + CLASSES.size() + " classes");
  }
}
