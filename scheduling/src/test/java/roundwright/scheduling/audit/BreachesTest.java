package roundwright.scheduling.audit;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;
import roundwright.scheduling.Scene;
import roundwright.scheduling.cost.RuleName;

/** Each breach just under, at and over its boundary; the values are worked out from the page. */
final class BreachesTest {
  private static Scene oneRound() {
    return new Scene().hall("main", 10).discipline("cube3").round("a", "cube3", 1);
  }

  /** Two venues: house with main and annex, school 15 minutes away, barn at no named distance. */
  private static Scene fourHalls() {
    return new Scene()
        .venue("house")
        .hall("main", 10)
        .hall("annex", 10)
        .venue("school")
        .hall("gym", 10)
        .venue("farm")
        .hall("barn", 10)
        .travel("school", "house", 15)
        .discipline("cube3")
        .round("a", "cube3", 1)
        .discipline("blind")
        .round("b", "blind", 1)
        .person("ada")
        .enters("cube3", 20)
        .enters("blind", 90);
  }

  @Test
  void each_entrant_is_in_exactly_one_group_and_nobody_else_is() {
    Scene scene =
        oneRound()
            .person("ada")
            .enters("cube3", 20)
            .person("ben")
            .enters("cube3", 30)
            .person("cy")
            .group("g1", "a", 1, "main", "09:00-09:30")
            .solve("ada")
            .group("g2", "a", 2, "main", "10:00-10:30")
            .solve("ben");
    assertEquals("0", scene.amount(RuleName.ENTRY_MISSING));
    assertEquals("0", scene.solve("ben").amount(RuleName.ENTRY_MISSING));
    assertEquals("3", scene.solve("ada").amount(RuleName.ENTRY_MISSING));
    assertEquals("4", scene.solve("cy").amount(RuleName.ENTRY_MISSING));
    // still one stranger
    assertEquals("4", scene.in("g1").solve("cy").amount(RuleName.ENTRY_MISSING));
    // ada is in one group again, ben in none
    assertEquals("4", scene.drop("g2").amount(RuleName.ENTRY_MISSING));
  }

  @Test
  void a_round_without_a_group_misses_all_its_entrants() {
    Scene scene = oneRound().person("ada").enters("cube3", 20).person("ben").enters("cube3", 9);
    assertEquals("6", scene.amount(RuleName.ENTRY_MISSING));
  }

  @ParameterizedTest
  @CsvSource({
    "main,  09:59, 1", "main,  10:00, 0",
    "annex, 10:04, 1", "annex, 10:05, 0",
    "gym,   10:14, 1", "gym,   10:15, 0",
    "barn,  10:29, 1", "barn,  10:30, 0",
  })
  void nobody_is_in_two_places_and_the_way_takes_its_time(
      String hall, String start, String amount) {
    Scene scene =
        fourHalls()
            .group("g1", "a", 1, "main", "09:00-10:00")
            .solve("ada")
            .group("g2", "b", 1, hall, start + "-11:00")
            .solve("ada");
    assertEquals(amount, scene.amount(RuleName.TWO_PLACES));
  }

  @ParameterizedTest
  @CsvSource({
    "08:00-09:00, 0",
    "08:00-09:01, 1",
    "10:00-11:00, 0",
    "09:59-11:00, 1",
    "09:10-09:20, 1",
  })
  void busy_times_are_in_no_hall(String busy, String amount) {
    Scene scene = fourHalls().busy(busy).group("g1", "a", 1, "gym", "09:00-10:00").solve("ada");
    assertEquals(amount, scene.amount(RuleName.TWO_PLACES));
  }

  @Test
  void busy_times_that_touch_or_overlap_are_one_and_clash_with_nothing_by_themselves() {
    Scene scene =
        fourHalls()
            .busy("09:30-10:00", "08:00-09:00", "08:30-09:30")
            .group("g1", "a", 1, "main", "09:50-10:10")
            .solve("ada");
    assertEquals("1", scene.amount(RuleName.TWO_PLACES));
  }

  @Test
  void what_lasts_longest_before_counts_even_if_something_shorter_came_between() {
    Scene scene =
        fourHalls()
            .group("g1", "a", 1, "main", "09:00-12:00")
            .solve("ada")
            .group("g2", "b", 1, "main", "10:00-10:30")
            .solve("ada")
            .group("g3", "b", 2, "main", "11:00-11:30")
            .solve("ada");
    assertEquals("2", scene.amount(RuleName.TWO_PLACES));
  }

  @Test
  void of_two_that_start_together_the_shorter_comes_first() {
    Scene scene =
        fourHalls()
            .group("g0", "a", 1, "main", "09:00-10:00")
            .solve("ada")
            .group("g1", "b", 1, "annex", "10:00-10:30")
            .solve("ada")
            .group("g2", "b", 2, "main", "10:00-10:20")
            .solve("ada");
    assertEquals("1", scene.amount(RuleName.TWO_PLACES));
    assertEquals("2", scene.in("g2").at("10:00-10:40").amount(RuleName.TWO_PLACES));
  }

  @Test
  void somebody_listed_twice_in_a_group_has_two_commitments() {
    Scene scene = fourHalls().group("g1", "a", 1, "main", "09:00-10:00").solve("ada", "ada");
    assertEquals("1", scene.amount(RuleName.TWO_PLACES));
    assertEquals("3", scene.amount(RuleName.ENTRY_MISSING)); // blind, which has no group
    assertEquals("1", scene.amount(RuleName.UNQUALIFIED));
  }

  @Test
  void two_places_runs_over_midnight() {
    Scene scene =
        fourHalls()
            .group("g1", "a", 1, "main", "23:30-2/00:30")
            .solve("ada")
            .group("g2", "b", 1, "main", "2/00:30-2/01:00")
            .solve("ada");
    assertEquals("0", scene.amount(RuleName.TWO_PLACES));
    assertEquals("1", scene.in("g2").at("2/00:29-2/01:00").amount(RuleName.TWO_PLACES));
  }

  @ParameterizedTest
  @CsvSource({
    "09:00-11:00, 0",
    "09:30-10:30, 0",
    "08:59-09:30, 1",
    "10:30-11:01, 1",
    "12:00-12:30, 1",
  })
  void everybody_is_there_and_windows_that_touch_are_one(String stretch, String amount) {
    Scene scene =
        oneRound()
            .person("ada")
            .enters("cube3", 20)
            .available("09:00-10:00", "10:00-11:00")
            .group("g1", "a", 1, "main", stretch)
            .solve("ada");
    assertEquals(amount, scene.amount(RuleName.ABSENT));
  }

  @Test
  void an_empty_list_of_windows_means_never_and_no_list_means_always() {
    Scene scene =
        oneRound()
            .person("ada")
            .available()
            .person("ben")
            .group("g1", "a", 1, "main", "09:00-09:30")
            .judge("ada", "ben");
    scene.solve("ben");
    assertEquals("1", scene.amount(RuleName.ABSENT));
  }

  @Test
  void a_merely_likely_entrant_who_solves_while_away_is_not_absent() {
    Scene scene =
        oneRound()
            .advance("count", 1)
            .round("b", "cube3", 2)
            .person("ada")
            .enters("cube3", 20)
            .available("09:00-10:00")
            .person("ben")
            .enters("cube3", 30)
            .available("09:00-10:00")
            .group("g1", "a", 1, "main", "09:00-10:00")
            .solve("ada", "ben")
            .group("g2", "b", 1, "main", "10:30-11:00")
            .solve("ada");
    assertEquals("0", scene.amount(RuleName.ABSENT));
    assertEquals("1", scene.amount(RuleName.LIKELY_AWAY));
    assertEquals("1", scene.judge("ada").amount(RuleName.ABSENT));
    assertEquals("2", scene.solve("ben").amount(RuleName.ABSENT));
    assertEquals("1", scene.amount(RuleName.LIKELY_AWAY));
  }

  @Test
  void a_crew_has_the_skills_of_its_duties() {
    Scene scene =
        oneRound()
            .discipline("blind")
            .person("ada")
            .judges()
            .person("ben")
            .scrambles("blind")
            .person("cy")
            .runs()
            .person("di")
            .group("g1", "a", 1, "main", "09:00-09:30")
            .solve("di");
    assertEquals("0", scene.judge("ada").run("cy").amount(RuleName.UNQUALIFIED));
    assertEquals("1", scene.scramble("ben").amount(RuleName.UNQUALIFIED));
    assertEquals("2", scene.run("ada").amount(RuleName.UNQUALIFIED));
    assertEquals("3", scene.judge("di").amount(RuleName.UNQUALIFIED));
  }

  @Test
  void a_second_listing_counts_once_however_unskilled() {
    Scene scene =
        oneRound()
            .person("ada")
            .judges()
            .group("g1", "a", 1, "main", "09:00-09:30")
            .solve("ada")
            .judge("ada")
            .run("ada");
    assertEquals("2", scene.amount(RuleName.UNQUALIFIED));
  }

  @ParameterizedTest
  @CsvSource({
    "10:05, 0",
    "10:04, 1",
    "10:00, 1",
    "09:59, 2",
    "09:55, 2",
    "09:54, 3",
  })
  void groups_in_a_hall_leave_time_to_set_up(String start, String amount) {
    Scene scene =
        fourHalls()
            .group("g1", "a", 1, "main", "09:00-10:00")
            .solve("ada")
            .group("g2", "b", 1, "main", start + "-11:00")
            .solve("ada");
    assertEquals(amount, scene.amount(RuleName.HALL_CLASH));
    assertEquals("0", scene.set("hall", "annex").amount(RuleName.HALL_CLASH));
  }

  @Test
  void the_latest_end_so_far_counts_in_a_hall() {
    Scene scene =
        fourHalls()
            .group("g1", "a", 1, "main", "09:00-11:00")
            .solve("ada")
            .group("g2", "b", 1, "main", "09:30-09:40")
            .solve("ada")
            .group("g3", "b", 2, "main", "10:00-10:30")
            .solve("ada");
    // 95 minutes are 19 fives, 65 minutes are 13
    assertEquals("32", scene.amount(RuleName.HALL_CLASH));
  }

  @Test
  void of_two_groups_that_start_together_in_a_hall_the_lower_number_comes_first() {
    Scene scene =
        oneRound()
            .person("ada")
            .group("g1", "a", 1, "main", "09:00-10:00")
            .solve("ada")
            .group("g2", "a", 2, "main", "09:00-09:30")
            .solve("ada");
    // the second starts 65 minutes too soon after the first
    assertEquals("13", scene.amount(RuleName.HALL_CLASH));
  }

  @ParameterizedTest
  @CsvSource({
    "09:00-10:00, 0",
    "08:55-10:00, 1",
    "08:54-10:00, 2",
    "17:00-18:01, 1",
    "11:55-12:01, 1",
    "11:00-13:30, 6",
    "12:10-12:20, 2",
    "14:50-15:20, 2",
    "05:00-06:00, 12",
  })
  void halls_are_open_and_not_taken_by_a_fixed_point(String stretch, String amount) {
    Scene scene =
        new Scene()
            .hall("main", 10)
            .open("09:00-15:00", "15:10-18:00")
            .fixedPoint("12:00-12:30")
            .fixedPoint("12:15-12:30")
            .discipline("cube3")
            .round("a", "cube3", 1)
            .person("ada")
            .group("g1", "a", 1, "main", stretch)
            .solve("ada");
    assertEquals(amount, scene.amount(RuleName.HALL_CLOSED));
  }

  @Test
  void a_minute_outside_the_windows_and_in_a_fixed_point_counts_once() {
    Scene scene =
        new Scene()
            .hall("main", 10)
            .open("09:00-12:00")
            .fixedPoint("11:50-12:30")
            .discipline("cube3")
            .round("a", "cube3", 1)
            .person("ada")
            .group("g1", "a", 1, "main", "11:30-12:10")
            .solve("ada");
    assertEquals("4", scene.amount(RuleName.HALL_CLOSED));
  }

  @Test
  void a_fixed_point_stands_at_its_hour_in_the_zone_of_each_hall() {
    Scene scene =
        new Scene()
            .zone("Europe/Lisbon")
            .venue("pier")
            .hall("main", 10)
            .venue("school")
            .set("zone", "Europe/Madrid")
            .hall("gym", 10)
            .fixedPoint("12:00-13:00")
            .discipline("cube3")
            .round("a", "cube3", 1)
            .person("ada")
            .group("g1", "a", 1, "main", "12:00-12:30")
            .solve("ada")
            .group("g2", "a", 2, "gym", "12:00-12:30")
            .solve("ada");
    assertEquals("12", scene.amount(RuleName.HALL_CLOSED));
    assertEquals("6", scene.in("g2").at("13:00-13:30").amount(RuleName.HALL_CLOSED));
  }

  @Test
  void a_hall_has_what_the_discipline_needs_and_is_among_the_halls_of_the_round() {
    Scene scene =
        new Scene()
            .hall("main", 10)
            .set("features", List.of("quiet", "daylight"))
            .hall("annex", 10)
            .discipline("blind")
            .set("needs", List.of("quiet"))
            .round("a", "blind", 1)
            .person("ada")
            .group("g1", "a", 1, "main", "09:00-10:00")
            .solve("ada");
    assertEquals("0", scene.amount(RuleName.HALL_UNSUITED));
    assertEquals("1", scene.set("hall", "annex").amount(RuleName.HALL_UNSUITED));
    Scene other =
        new Scene()
            .hall("main", 10)
            .hall("annex", 10)
            .discipline("cube3")
            .round("a", "cube3", 1)
            .set("halls", List.of("annex"))
            .person("ada")
            .group("g1", "a", 1, "main", "09:00-10:00")
            .solve("ada");
    assertEquals("1", other.amount(RuleName.HALL_UNSUITED));
    assertEquals("0", other.set("hall", "annex").amount(RuleName.HALL_UNSUITED));
  }

  @ParameterizedTest
  @CsvSource({
    "10:45, 0",
    "10:44, 1",
    "10:40, 1",
    "10:39, 2",
    "09:00, 21",
  })
  void a_round_starts_after_the_one_before_it_and_the_turnaround(String start, String amount) {
    Scene scene =
        oneRound()
            .advance("count", 2)
            .round("b", "cube3", 2)
            .person("ada")
            .enters("cube3", 20)
            .group("g1", "a", 1, "main", "09:00-10:30")
            .solve("ada")
            .group("g2", "a", 2, "main", "09:30-10:00")
            .solve("ada")
            .group("g3", "b", 1, "main", start + "-12:00")
            .solve("ada")
            .group("g4", "b", 2, "main", "11:30-12:00")
            .solve("ada");
    assertEquals(amount, scene.amount(RuleName.ROUND_ORDER));
    assertEquals("0", scene.drop("g3").amount(RuleName.ROUND_ORDER));
    assertEquals("0", scene.drop("g4").amount(RuleName.ROUND_ORDER));
  }

  @ParameterizedTest
  @CsvSource({
    "09:00-10:00, 0",
    "08:59-10:00, 1",
    "08:54-10:00, 2",
    "09:30-10:01, 1",
    "08:00-11:00, 24",
  })
  void a_round_keeps_its_window(String stretch, String amount) {
    Scene scene =
        oneRound()
            .set("notBefore", Scene.time("09:00"))
            .set("notAfter", Scene.time("10:00"))
            .person("ada")
            .group("g1", "a", 1, "main", stretch)
            .solve("ada");
    assertEquals(amount, scene.amount(RuleName.ROUND_WINDOW));
  }

  @Test
  void the_window_of_a_round_is_in_the_zone_of_the_event() {
    Scene scene =
        new Scene()
            .zone("Europe/Lisbon")
            .venue("school")
            .set("zone", "Europe/Madrid")
            .hall("gym", 10)
            .discipline("cube3")
            .round("a", "cube3", 1)
            .set("notBefore", Scene.time("09:00"))
            .person("ada")
            .group("g1", "a", 1, "gym", "09:00-10:00")
            .solve("ada");
    assertEquals("12", scene.amount(RuleName.ROUND_WINDOW));
    assertEquals("0", scene.at("10:00-11:00").amount(RuleName.ROUND_WINDOW));
  }

  @ParameterizedTest
  @CsvSource({
    // fill 1.6: floor(4.8) = 4 on three stations, floor(16.0) = 16 on ten, floor(17.6) on eleven
    "rotating, 3, 4, 0",
    "rotating, 3, 5, 1",
    "rotating, 10, 16, 0",
    "rotating, 10, 17, 1",
    "rotating, 11, 17, 1",
    "rotating, 12, 4, 2",
    "rotating, 12, 21, 4",
    "fixed, 3, 3, 0",
    "fixed, 3, 4, 1",
    "fixed, 12, 12, 2",
  })
  void a_group_fits_its_stations_and_its_stations_the_hall(
      String seating, int stations, int people, String amount) {
    Scene scene = oneRound().set("seating", seating).person("ada");
    scene.group("g1", "a", 1, "main", "09:00-10:00").set("stations", stations);
    for (int i = 0; i < people; i++) {
      scene.solve("ada");
    }
    assertEquals(amount, scene.amount(RuleName.OVERSIZE));
  }

  @Test
  void the_round_may_allow_fewer_stations_and_a_fill_of_its_own() {
    Scene scene =
        oneRound()
            .set("stations", 4)
            .set("fill", 1.15)
            .person("ada")
            .group("g1", "a", 1, "main", "09:00-10:00")
            .set("stations", 6)
            .solve("ada", "ada", "ada", "ada", "ada", "ada", "ada");
    // floor(6.9) = 6, one person over; six stations where four may be used
    assertEquals("3", scene.amount(RuleName.OVERSIZE));
  }

  @Test
  void fill_is_counted_in_decimals() {
    // 1.15 x 20 is 23 exactly; in binary fractions it is a little less
    Scene scene = new Scene().hall("main", 20).discipline("cube3").round("a", "cube3", 1);
    scene.set("fill", 1.15).person("ada").group("g1", "a", 1, "main", "09:00-10:00");
    scene.set("stations", 20);
    for (int i = 0; i < 23; i++) {
      scene.solve("ada");
    }
    assertEquals("0", scene.amount(RuleName.OVERSIZE));
  }

  @ParameterizedTest
  @CsvSource({
    "35, 0", "34, 1", "30, 1", "29, 2", "36, 1", "40, 1", "41, 2",
  })
  void where_the_minutes_are_laid_down_any_difference_counts(int minutes, String amount) {
    Scene scene =
        oneRound()
            .set("minutesPerGroup", 35)
            .person("ada")
            .group("g1", "a", 1, "main", "09:00-09:" + minutes)
            .solve("ada");
    assertEquals(amount, scene.amount(RuleName.TOO_SHORT));
  }

  @ParameterizedTest
  @CsvSource({
    "240, 13:00, 0",
    "239, 13:00, 1",
    "235, 13:00, 1",
    "234, 13:00, 2",
    "0, 09:01, 1",
  })
  void nobody_has_more_duty_in_a_day_than_they_do(int most, String end, String amount) {
    Scene scene =
        oneRound()
            .person("ada")
            .set("maxDutyMinutesPerDay", most)
            .group("g1", "a", 1, "main", "09:00-" + end)
            .solve("ada")
            .judge("ada");
    assertEquals(amount, scene.amount(RuleName.OVERWORKED));
  }

  @Test
  void a_duty_belongs_to_the_day_on_which_it_starts_in_its_hall() {
    Scene scene =
        new Scene()
            .zone("Europe/Lisbon")
            .venue("school")
            .set("zone", "Europe/Madrid")
            .hall("gym", 10)
            .discipline("cube3")
            .round("a", "cube3", 1)
            .person("ada")
            .set("maxDutyMinutesPerDay", 60)
            .group("g1", "a", 1, "gym", "22:00-23:00")
            .solve("ada")
            .judge("ada")
            .group("g2", "a", 2, "gym", "23:59-2/00:59")
            .solve("ada")
            .judge("ada");
    assertEquals("12", scene.amount(RuleName.OVERWORKED));
    assertEquals("0", scene.at("2/00:00-2/01:00").amount(RuleName.OVERWORKED));
  }

  @ParameterizedTest
  @CsvSource({
    "5, 09:05, 0",
    "5, 09:04, 1",
    "45, 09:00, 0",
    "45, 09:45, 0",
    "45, 10:30, 0",
    "45, 10:00, 1",
    "7, 00:07, 0",
    "7, 01:00, 1",
    "1, 09:01, 0",
    "60, 09:00, 0",
    "60, 09:30, 1",
  })
  void groups_start_on_the_grid_counted_from_midnight(int grid, String start, String amount) {
    Scene scene =
        oneRound()
            .rule("startGridMinutes", grid)
            .person("ada")
            .group("g1", "a", 1, "main", start + "-12:00")
            .solve("ada");
    assertEquals(amount, scene.amount(RuleName.OFF_GRID));
  }

  @Test
  void midnight_is_that_of_the_hall() {
    Scene scene =
        new Scene()
            .zone("UTC")
            .venue("kathmandu")
            .set("zone", "Asia/Kathmandu")
            .hall("main", 10)
            .discipline("cube3")
            .round("a", "cube3", 1)
            .rule("startGridMinutes", 60)
            .person("ada")
            .group("g1", "a", 1, "main", "09:00-10:00")
            .solve("ada");
    assertEquals("0", scene.amount(RuleName.OFF_GRID));
    assertEquals("1", scene.at("09:45-10:30").amount(RuleName.OFF_GRID));
  }

  @Test
  void a_pin_that_names_the_start_frees_a_group_from_the_grid() {
    Scene scene =
        oneRound()
            .person("ada")
            .pin("groups", "round", "a", "number", 1, "hall", "main")
            .group("g1", "a", 1, "main", "09:03-09:30")
            .solve("ada");
    assertEquals("1", scene.amount(RuleName.OFF_GRID));
    scene.pin("groups", "round", "a", "number", 1, "start", Scene.time("10:02"));
    assertEquals("0", scene.amount(RuleName.OFF_GRID));
    assertEquals("1", scene.set("number", 2).amount(RuleName.OFF_GRID));
  }

  private static Scene finalWith(int entrants) {
    Scene scene = new Scene().hall("main", 4).discipline("cube3").round("a", "cube3", 1);
    for (int i = 0; i < entrants; i++) {
      scene.person("p" + i).enters("cube3", 20);
    }
    return scene.group("g1", "a", 1, "main", "09:00-09:30").solve("p0");
  }

  @Test
  void a_final_that_fits_one_group_is_not_split() {
    // capacity floor(1.6 x 4) = 6
    Scene six = finalWith(6);
    assertEquals("0", six.amount(RuleName.WRONG_COUNT));
    six.group("g2", "a", 2, "main", "10:00-10:30").solve("p1");
    assertEquals("1", six.amount(RuleName.WRONG_COUNT));
    Scene seven = finalWith(7).group("g2", "a", 2, "main", "10:00-10:30").solve("p1");
    assertEquals("0", seven.amount(RuleName.WRONG_COUNT));
  }

  @Test
  void a_round_has_as_many_groups_as_are_laid_down_and_then_may_be_split() {
    Scene scene =
        new Scene()
            .hall("main", 4)
            .discipline("cube3")
            .round("a", "cube3", 1)
            .set("groups", 2)
            .person("p0")
            .enters("cube3", 20)
            .person("p1")
            .enters("cube3", 20);
    assertEquals("1", scene.amount(RuleName.WRONG_COUNT));
    scene.group("g1", "a", 1, "main", "09:00-09:30").solve("p0");
    assertEquals("1", scene.amount(RuleName.WRONG_COUNT));
    scene.group("g2", "a", 2, "main", "10:00-10:30").solve("p1");
    assertEquals("0", scene.amount(RuleName.WRONG_COUNT));
    scene.group("g3", "a", 7, "main", "11:00-11:30").solve("p1");
    assertEquals("1", scene.amount(RuleName.WRONG_COUNT));
  }

  @Test
  void a_round_with_entrants_has_a_group_and_one_without_has_none() {
    assertEquals("0", oneRound().amount(RuleName.WRONG_COUNT));
    assertEquals("1", oneRound().person("ada").enters("cube3", 9).amount(RuleName.WRONG_COUNT));
  }

  @ParameterizedTest
  @ValueSource(strings = {"1 2", "2 1", "1 3", "2 3", "1 1"})
  void groups_are_numbered_in_time(String numbers) {
    Scene scene =
        oneRound()
            .advance("count", 1)
            .round("b", "cube3", 2)
            .set("entrants", List.of())
            .person("ada")
            .group("g1", "a", numbers.charAt(0) - '0', "main", "09:00-09:30")
            .solve("ada")
            .group("g2", "a", numbers.charAt(2) - '0', "main", "10:00-10:30")
            .solve("ada");
    assertEquals(numbers.equals("1 2") ? "0" : "1", scene.amount(RuleName.WRONG_COUNT));
    // with a kept plan they only need to differ
    assertEquals(numbers.equals("1 1") ? "1" : "0", scene.keep().amount(RuleName.WRONG_COUNT));
  }

  @Test
  void groups_that_start_together_are_numbered_by_hall_whenever_they_end() {
    Scene scene =
        new Scene()
            .hall("main", 1)
            .hall("annex", 1)
            .discipline("cube3")
            .round("a", "cube3", 1)
            .person("ada")
            .enters("cube3", 3)
            .person("ben")
            .enters("cube3", 4)
            .group("g1", "a", 1, "annex", "09:00-10:30")
            .solve("ada")
            .group("g2", "a", 2, "main", "09:00-09:30")
            .solve("ben");
    assertEquals("0", scene.amount(RuleName.WRONG_COUNT));
    assertEquals(
        "1", scene.set("number", 1).in("g1").set("number", 2).amount(RuleName.WRONG_COUNT));
  }

  @Test
  void pins_are_kept() {
    Scene scene =
        fourHalls()
            .person("ben")
            .pin("groups", "round", "a", "number", 1, "hall", "main")
            .pin("groups", "round", "a", "number", 1, "start", Scene.time("09:00"))
            .pin("groups", "round", "a", "number", 1, "hall", "main", "start", Scene.time("09:00"))
            .pin("competitors", "person", "ada", "round", "a", "number", 1)
            .pin("duties", "person", "ben", "round", "a", "number", 1, "role", "runner");
    assertEquals("5", scene.amount(RuleName.PIN_MOVED));
    scene.group("g1", "a", 1, "main", "09:00-10:00").solve("ada").run("ben");
    assertEquals("0", scene.amount(RuleName.PIN_MOVED));
    assertEquals("2", scene.set("hall", "annex").amount(RuleName.PIN_MOVED));
    assertEquals("3", scene.at("09:05-10:00").amount(RuleName.PIN_MOVED));
    assertEquals("4", scene.nobody().solve("ada").judge("ben").amount(RuleName.PIN_MOVED));
  }

  @Test
  void a_pin_counts_in_the_zone_of_its_hall() {
    Scene scene =
        new Scene()
            .zone("Europe/Lisbon")
            .venue("school")
            .set("zone", "Europe/Madrid")
            .hall("gym", 10)
            .discipline("cube3")
            .round("a", "cube3", 1)
            .person("ada")
            .pin("groups", "round", "a", "number", 1, "hall", "gym", "start", Scene.time("09:00"))
            .pin("groups", "round", "a", "number", 1, "start", Scene.time("08:00"))
            .group("g1", "a", 1, "gym", "09:00-10:00")
            .solve("ada");
    assertEquals("0", scene.amount(RuleName.PIN_MOVED));
  }
}
