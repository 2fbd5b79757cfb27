package roundwright.scheduling.audit;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;

import java.math.BigDecimal;
import java.util.List;
import java.util.Map;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import roundwright.scheduling.Scene;
import roundwright.scheduling.cost.RuleName;

/** Gaps and each strain rule around its boundary; the values are worked out from the page. */
final class StrainTest {
  private static final BigDecimal TWO = BigDecimal.valueOf(2);

  private static Scene oneRound() {
    return new Scene().hall("main", 10).discipline("cube3").round("a", "cube3", 1);
  }

  private static Scene withPeople(Scene scene, int people) {
    for (int i = 0; i < people; i++) {
      scene.person("p" + i).enters("cube3", 10 + i);
    }
    return scene;
  }

  @ParameterizedTest
  @CsvSource({
    // wanted: judges min(4, 4) = 4, scramblers ceil(4 / 3) = 2, runners ceil(4 / 5) = 1
    "0, 0, 0, 7, 0",
    "4, 2, 1, 0, 0",
    "3, 2, 1, 1, 0",
    "5, 2, 1, 0, 1",
    "5, 0, 3, 2, 3",
  })
  void duties_are_filled_and_nobody_is_there_in_vain(
      int judges, int scramblers, int runners, String unfilled, String spare) {
    Scene scene = withPeople(oneRound(), 4).group("g", "a", 1, "main", "09:00-09:30");
    scene.set("stations", 4).solve("p0", "p1", "p2", "p3");
    for (int i = 0; i < judges; i++) {
      scene.judge("p0");
    }
    for (int i = 0; i < scramblers; i++) {
      scene.scramble("p0");
    }
    for (int i = 0; i < runners; i++) {
      scene.run("p0");
    }
    assertEquals(unfilled, scene.amount(RuleName.UNFILLED));
    assertEquals(spare, scene.amount(RuleName.SPARE_CREW));
  }

  @Test
  void a_round_may_want_exactly_this_crew() {
    Scene scene =
        withPeople(oneRound().set("crew", Map.of("judges", 0, "scramblers", 2, "runners", 0)), 1)
            .group("g", "a", 1, "main", "09:00-09:30")
            .solve("p0");
    assertEquals("2", scene.amount(RuleName.UNFILLED));
    assertEquals("3", scene.judge("p0", "p0").run("p0").amount(RuleName.SPARE_CREW));
  }

  private static Scene threeGroups(int first, int second, int third) {
    Scene scene = withPeople(oneRound(), first + second + third);
    int next = 0;
    int[] sizes = {first, second, third};
    for (int g = 0; g < 3; g++) {
      scene.group("g" + g, "a", g + 1, "main", List.of("09", "10", "11").get(g) + ":00-12:00");
      for (int i = 0; i < sizes[g]; i++) {
        scene.solve("p" + next);
        next++;
      }
    }
    return scene;
  }

  @ParameterizedTest
  @CsvSource({
    "4, 4, 4, 0",
    "5, 4, 3, 0",
    "6, 3, 3, 1",
    "7, 3, 2, 5",
    "8, 2, 2, 11",
    "5, 4, 4, 0",
  })
  void groups_are_even_but_for_one(int first, int second, int third, String amount) {
    // 4,4,4: fair 4; 6,3,3: (6 - 4 - 1)^2 = 1; 7,3,2: 4 + 0 + 1; 8,2,2: 9 + 1 + 1
    assertEquals(amount, threeGroups(first, second, third).amount(RuleName.UNEVEN_GROUPS));
  }

  @Test
  void fair_goes_by_stations_in_use() {
    // 12 entrants on 2 + 4 + 6 stations: fair 2, 4, 6
    Scene scene = threeGroups(2, 4, 6);
    scene.in("g0").set("stations", 2).in("g1").set("stations", 4).in("g2").set("stations", 6);
    assertEquals("0", scene.amount(RuleName.UNEVEN_GROUPS));
    // fair 12 x 1/3: sizes 2, 4, 6 against 4 each: 1 + 0 + 1
    scene.in("g0").set("stations", 3).in("g1").set("stations", 3).in("g2").set("stations", 3);
    assertEquals("2", scene.amount(RuleName.UNEVEN_GROUPS));
    // in fixed seating everybody has a station, so every size is fair
    assertEquals("0", scene.rule("seating", "fixed").amount(RuleName.UNEVEN_GROUPS));
  }

  @Test
  void a_fair_size_that_is_no_whole_number_is_counted_exactly() {
    // 13 entrants, fair 13/3: sizes 6, 5, 2 -> (2/3)^2 + 0 + (4/3)^2 = 20/9 = 2.222...
    String amount = threeGroups(6, 5, 2).amount(RuleName.UNEVEN_GROUPS);
    assertEquals("2.2222222222", amount.substring(0, 12));
  }

  @ParameterizedTest
  @CsvSource({
    // capacity floor(1.6 x 10) = 16
    "16, 1, 0",
    "16, 2, 1",
    "17, 2, 0",
    "17, 3, 1",
    "0, 2, 2",
  })
  void groups_beyond_the_fewest_cost(int entrants, int groups, String amount) {
    Scene scene = withPeople(oneRound(), entrants).person("q");
    for (int g = 0; g < groups; g++) {
      scene.group("g" + g, "a", g + 1, "main", "09:0" + g + "-12:00").solve("q");
    }
    assertEquals(amount, scene.amount(RuleName.EXTRA_GROUP));
  }

  @Test
  void groups_laid_down_cost_nothing_and_neither_do_those_of_a_round_without_a_suitable_hall() {
    Scene scene = withPeople(oneRound().set("groups", 2), 2);
    scene.group("g0", "a", 1, "main", "09:00-09:30").solve("p0");
    scene.group("g1", "a", 2, "main", "10:00-10:30").solve("p1");
    assertEquals("0", scene.amount(RuleName.EXTRA_GROUP));
    Scene unsuited =
        new Scene()
            .hall("main", 10)
            .discipline("cube3")
            .set("needs", List.of("quiet"))
            .round("a", "cube3", 1);
    withPeople(unsuited, 2).group("g0", "a", 1, "main", "09:00-09:30").solve("p0");
    unsuited.group("g1", "a", 2, "main", "10:00-10:30").solve("p1");
    assertEquals("0", unsuited.amount(RuleName.EXTRA_GROUP));
  }

  @ParameterizedTest
  @CsvSource({
    // p0 is the fastest of five; groups of p0 .. p4, in order of time 0, 1
    // slow-first ranks p4 p3 p2 p1 p0: wanted floor(rank x 2 / 5) = 0 0 0 1 1
    "slow-first, 1 1 0 0 0, 0",
    "slow-first, 0 1 0 0 0, 1",
    "slow-first, 0 0 1 1 1, 5",
    // fast-first ranks p0 p1 p2 p3 p4: wanted 0 0 0 1 1
    "fast-first, 0 0 0 1 1, 0",
    "fast-first, 1 0 0 1 1, 1",
    // mixed: rank mod 2 = 0 1 0 1 0
    "mixed, 0 1 0 1 0, 0",
    "mixed, 1 0 1 0 1, 5",
  })
  void competitors_are_where_the_seeding_wants_them(String seeding, String places, String amount) {
    Scene scene = withPeople(oneRound().set("seeding", seeding), 5);
    String place = places.replace(" ", "");
    for (int g = 0; g < 2; g++) {
      // the number says nothing: the order is by start
      scene.group("g" + g, "a", 2 - g, "main", "1" + g + ":00-12:00");
      for (int i = 0; i < 5; i++) {
        if (place.charAt(i) - '0' == g) {
          scene.solve("p" + i);
        }
      }
    }
    assertEquals(amount, scene.amount(RuleName.SEEDING));
  }

  @Test
  void ties_of_seeding_go_by_id_in_either_direction_and_strangers_have_no_rank() {
    for (String seeding : List.of("slow-first", "fast-first")) {
      Scene scene = oneRound().set("seeding", seeding);
      scene.person("b").enters("cube3", 20).person("a").enters("cube3", 20).person("c");
      scene.group("g1", "a", 1, "main", "09:00-09:30").solve("a");
      scene.group("g2", "a", 2, "main", "10:00-10:30").solve("b", "c");
      assertEquals("0", scene.amount(RuleName.SEEDING), seeding);
    }
  }

  @ParameterizedTest
  @CsvSource({
    // entries 0: share 1; 1: 0.55; 6: 1.3; 7: 1.3 at most; 30 minutes: 2^2 / share
    "0, 4",
    "1, 7.272727",
    "6, 3.076923",
    "7, 3.076923",
  })
  void load_is_squared_and_shared(int entries, String amount) {
    Scene scene = oneRound();
    for (int i = 1; i < 7; i++) {
      scene.discipline("d" + i);
    }
    scene.person("q").enters("cube3", 20).person("p");
    for (int i = 0; i < entries; i++) {
      scene.enters(i == 0 ? "cube3" : "d" + i, 20);
    }
    scene.group("g1", "a", 1, "main", "09:00-09:20").solve("q").judge("p");
    scene.group("g2", "a", 2, "main", "2/09:00-2/09:10").solve("q").run("p");
    String found = scene.amount(RuleName.LOAD);
    assertEquals(amount, found.substring(0, Math.min(found.length(), amount.length())));
  }

  @Test
  void a_share_of_ones_own_counts_instead() {
    Scene scene = oneRound().person("p").set("share", 2.5).person("q");
    scene.group("g1", "a", 1, "main", "09:00-10:00").solve("q").judge("p");
    // (60 / 15)^2 / 2.5
    assertEquals("6.4", scene.amount(RuleName.LOAD));
  }

  @ParameterizedTest
  @CsvSource({
    "09:50-10:00, 10:10, 0",
    "09:50-10:00, 10:09, 1",
    "09:50-10:00, 10:00, 1",
    "09:50-10:00, 09:59, 0",
  })
  void there_is_time_to_breathe_before_solving(String duty, String start, String amount) {
    Scene scene = withPeople(oneRound(), 1).person("q");
    scene.group("g1", "a", 1, "main", duty).solve("q").judge("p0");
    scene.group("g2", "a", 2, "main", start + "-11:00").solve("p0");
    assertEquals(amount, scene.amount(RuleName.BREATHING));
    // judging right after solving needs no breath, solving after solving does
    assertEquals("0", scene.in("g1").nobody().solve("q").in("g2").amount(RuleName.BREATHING));
    assertEquals(amount, scene.in("g1").nobody().solve("p0").amount(RuleName.BREATHING));
  }

  @Test
  void a_group_after_two_commitments_lacks_breath_once() {
    Scene scene = withPeople(oneRound(), 1).person("q");
    scene.group("g1", "a", 1, "main", "09:00-09:55").solve("q").judge("p0");
    scene.group("g2", "a", 2, "main", "09:00-10:00").solve("q").judge("p0");
    scene.group("g3", "a", 3, "main", "10:00-11:00").solve("p0");
    assertEquals("1", scene.amount(RuleName.BREATHING));
  }

  @ParameterizedTest
  @CsvSource({
    // 60 + 30 = 90 minutes are allowed, more is not; 15 minutes between break the chain
    "10:00-10:30, 0",
    "10:00-10:31, 0.1",
    "10:14-11:14, 3",
    "10:15-11:15, 0",
    "10:14-10:54, 1",
  })
  void runs_of_duty_are_not_too_long(String second, String amount) {
    Scene scene = oneRound().person("p").person("q");
    scene.group("g1", "a", 1, "main", "09:00-10:00").solve("q").judge("p");
    scene.group("g2", "a", 2, "main", second).solve("q").run("p");
    assertEquals(amount, scene.amount(RuleName.LONG_RUN));
  }

  @Test
  void solving_joins_a_chain_but_is_no_duty_and_the_latest_end_counts() {
    Scene scene = oneRound().person("p").person("q");
    scene.group("g1", "a", 1, "main", "09:00-10:00").solve("q").judge("p");
    scene.group("g2", "a", 2, "main", "10:14-11:00").solve("p");
    scene.group("g3", "a", 3, "main", "11:14-12:14").solve("q").judge("p");
    // 120 minutes of duty in one chain
    assertEquals("3", scene.amount(RuleName.LONG_RUN));
    assertEquals("0", scene.in("g2").at("10:14-10:59").amount(RuleName.LONG_RUN));
    // a short one inside a long one does not end the chain
    scene.in("g1").at("09:00-11:00").in("g2").at("09:30-09:40").in("g3").at("11:14-11:24");
    assertEquals("4", scene.amount(RuleName.LONG_RUN));
  }

  @Test
  void nobody_judges_their_own_household() {
    Scene scene =
        oneRound()
            .person("a")
            .set("household", "h1")
            .person("b")
            .set("household", "h1")
            .person("c")
            .set("household", "h2")
            .person("d")
            .person("e")
            .set("household", null)
            .group("g1", "a", 1, "main", "09:00-10:00")
            .solve("a", "c", "d");
    assertEquals("0", scene.judge("e").scramble("b").run("b").amount(RuleName.KIN));
    assertEquals("1", scene.judge("b").amount(RuleName.KIN));
    assertEquals("2", scene.solve("b").judge("a").amount(RuleName.KIN));
  }

  @Test
  void waiting_is_from_first_start_to_largest_end_of_a_day() {
    Scene scene = oneRound().person("p").person("q");
    scene.group("g1", "a", 1, "main", "09:00-11:30").solve("q");
    scene.group("g2", "a", 2, "main", "09:15-10:00").solve("q").judge("p");
    // q 2.5 hours, p 45 minutes
    assertEquals("3.25", scene.amount(RuleName.WAITING));
    scene.group("g3", "a", 3, "main", "2/09:00-2/09:12").solve("p");
    assertEquals("3.45", scene.amount(RuleName.WAITING));
  }

  @Test
  void a_day_over_midnight_is_the_day_it_starts_on() {
    Scene scene = oneRound().person("p");
    scene.group("g1", "a", 1, "main", "22:00-22:30").solve("p");
    scene.group("g2", "a", 2, "main", "23:30-2/00:30").solve("p");
    assertEquals("2.5", scene.amount(RuleName.WAITING));
    // from midnight on it is another day: half an hour, and an hour
    assertEquals("1.5", scene.at("2/00:00-2/01:00").amount(RuleName.WAITING));
  }

  private static Scene threeVenues() {
    return new Scene()
        .venue("house")
        .hall("main", 10)
        .hall("annex", 10)
        .venue("school")
        .hall("gym", 10)
        .discipline("cube3")
        .round("a", "cube3", 1)
        .person("p")
        .person("q")
        .group("g1", "a", 1, "main", "09:00-09:30")
        .solve("p");
  }

  @Test
  void hops_are_between_neighbours_of_a_day() {
    Scene scene = threeVenues();
    scene.group("g2", "a", 2, "annex", "11:00-11:30").solve("q").judge("p");
    assertEquals("1", scene.amount(RuleName.HOPS));
    scene.group("g3", "a", 3, "gym", "13:00-13:30").solve("p");
    assertEquals("7", scene.amount(RuleName.HOPS));
    scene.group("g4", "a", 4, "gym", "14:00-14:30").solve("p");
    assertEquals("7", scene.amount(RuleName.HOPS));
    scene.group("g5", "a", 5, "main", "2/09:00-2/09:30").solve("p");
    assertEquals("7", scene.amount(RuleName.HOPS));
  }

  @ParameterizedTest
  @CsvSource({
    // the window is 11:30-14:00, half an hour is wanted
    "11:00-13:30, '', 0",
    "11:00-13:31, '', 1",
    "12:00-14:30, '', 0",
    "11:59-14:30, '', 1",
    "11:00-14:00, '', 1",
    "11:00-11:30, '', 0",
    "14:00-15:00, 11:00-14:30, 0",
    "13:59-15:00, 11:00-13:31, 1",
    "13:59-15:00, 11:00-13:29, 0",
    "12:00-13:30, '', 0",
    "11:59-13:31, '', 1",
  })
  void a_meal_finds_a_free_stretch(String commitment, String busy, String amount) {
    Scene scene = oneRound().person("p");
    if (!busy.isEmpty()) {
      scene.busy(busy);
    }
    scene.group("g1", "a", 1, "main", commitment).solve("p");
    assertEquals(amount, scene.amount(RuleName.NO_MEAL));
  }

  @Test
  void each_meal_of_each_day_counts_in_the_zone_of_the_first_commitment() {
    Scene scene =
        new Scene()
            .zone("Europe/Lisbon")
            .venue("school")
            .set("zone", "Europe/Madrid")
            .hall("gym", 10)
            .discipline("cube3")
            .round("a", "cube3", 1)
            .person("p")
            .group("g1", "a", 1, "gym", "11:30-14:00")
            .solve("p");
    assertEquals("1", scene.amount(RuleName.NO_MEAL));
    assertEquals("0", scene.at("12:30-14:30").amount(RuleName.NO_MEAL));
    scene.rule(
        "meals",
        List.of(
            Map.of("from", "12:00", "to", "13:00", "minutes", 31),
            Map.of("from", "14:00", "to", "15:00", "minutes", 31)));
    assertEquals("2", scene.amount(RuleName.NO_MEAL));
    scene.group("g2", "a", 2, "gym", "2/12:30-2/14:30").solve("p");
    assertEquals("4", scene.amount(RuleName.NO_MEAL));
    assertEquals("0", scene.rule("meals", List.of()).amount(RuleName.NO_MEAL));
  }

  @Test
  void newcomers_do_not_solve_in_the_very_first_group() {
    Scene scene =
        oneRound()
            .hall("annex", 10)
            .person("p")
            .set("newcomer", true)
            .person("q")
            .group("g1", "a", 1, "main", "09:00-10:00")
            .solve("p");
    assertEquals("0", scene.amount(RuleName.NEWCOMER_FIRST));
    scene.group("g2", "a", 2, "main", "10:30-11:00").solve("q");
    assertEquals("1", scene.amount(RuleName.NEWCOMER_FIRST));
    // the annex comes before the main hall
    assertEquals("0", scene.set("hall", "annex").at("09:00-10:00").amount(RuleName.NEWCOMER_FIRST));
    assertEquals("0", scene.at("08:59-10:00").amount(RuleName.NEWCOMER_FIRST));
  }

  @Test
  void a_newcomer_in_the_first_group_of_a_later_round_is_no_matter() {
    Scene scene =
        oneRound()
            .advance("count", 1)
            .round("b", "cube3", 2)
            .person("p")
            .set("newcomer", true)
            .group("g1", "b", 1, "main", "09:00-10:00")
            .solve("p")
            .group("g2", "b", 2, "main", "11:00-12:00")
            .solve("p");
    assertEquals("0", scene.amount(RuleName.NEWCOMER_FIRST));
  }

  @ParameterizedTest
  @CsvSource({"09:59, 1", "10:00, 0", "09:00, 1", "08:00, 1"})
  void newcomers_solve_before_they_have_a_duty(String start, String amount) {
    Scene scene = oneRound().person("p").set("newcomer", true).person("q");
    scene.group("g1", "a", 1, "main", "09:00-10:00").solve("p");
    scene.group("g2", "a", 2, "main", start + "-11:00").solve("q").run("p");
    assertEquals(amount, scene.amount(RuleName.GREEN_JUDGE));
    assertEquals("0", scene.in("g1").nobody().solve("q").amount(RuleName.GREEN_JUDGE));
  }

  @Test
  void a_likely_entrant_may_be_away_at_a_price() {
    Scene scene =
        oneRound()
            .advance("percent", 50)
            .round("b", "cube3", 2)
            .advance("count", 9)
            .round("c", "cube3", 3)
            .set("continues", true)
            .person("p")
            .enters("cube3", 20)
            .available("09:00-10:00")
            .person("q")
            .enters("cube3", 30)
            .available()
            .group("g1", "b", 1, "main", "09:00-10:00")
            .solve("p", "q");
    // p goes on (half of two), q does not and is plainly absent
    assertEquals("0", scene.amount(RuleName.LIKELY_AWAY));
    assertEquals("1", scene.amount(RuleName.ABSENT));
    assertEquals("1", scene.at("09:01-10:01").amount(RuleName.LIKELY_AWAY));
    // likely through a round that continues a likely one
    scene.group("g2", "c", 1, "main", "11:00-12:00").solve("p");
    assertEquals("2", scene.amount(RuleName.LIKELY_AWAY));
    assertEquals("1", scene.amount(RuleName.ABSENT));
  }

  @Test
  void a_day_ends_soon_in_each_venue() {
    Scene scene = threeVenues();
    assertEquals("30", scene.amount(RuleName.LATE_FINISH));
    scene.group("g2", "a", 2, "annex", "10:00-10:10").solve("q");
    assertEquals("70", scene.amount(RuleName.LATE_FINISH));
    scene.group("g3", "a", 3, "gym", "10:00-10:20").solve("q");
    assertEquals("90", scene.amount(RuleName.LATE_FINISH));
    scene.group("g4", "a", 4, "gym", "23:50-2/00:20").solve("q");
    // the gym's day lasts from 10:00 to 00:20
    assertEquals("930", scene.amount(RuleName.LATE_FINISH));
    assertEquals("120", scene.at("2/00:00-2/00:30").amount(RuleName.LATE_FINISH));
  }

  @Test
  void a_weight_of_nought_turns_a_rule_off_and_others_multiply() {
    Scene scene = threeVenues();
    // half an hour at 4
    assertEquals(0, scene.verdict().strains().get(RuleName.WAITING).compareTo(TWO));
    scene.weight(RuleName.WAITING, 0).weight(RuleName.LATE_FINISH, 0.5);
    assertFalse(scene.verdict().amounts().containsKey(RuleName.WAITING));
    assertEquals(
        "15",
        scene.verdict().strains().get(RuleName.LATE_FINISH).stripTrailingZeros().toPlainString());
  }
}
