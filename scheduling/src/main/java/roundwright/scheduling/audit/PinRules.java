package roundwright.scheduling.audit;

import java.util.List;
import java.util.Map;
import java.util.function.Predicate;
import java.util.stream.Collectors;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Pins;

/** Whether what the organiser has fixed is kept. */
final class PinRules {
  private PinRules() {}

  private record Slot(String round, int number) {}

  /** 1 for each pin not kept. */
  static void pinMoved(Case given, Notes notes) {
    Map<Slot, List<Group>> groups =
        given.plan().groups().stream()
            .collect(Collectors.groupingBy(group -> new Slot(group.round(), group.number())));
    Pins pins = given.event().pins();
    for (Pins.GroupPin pin : pins.groups()) {
      boolean kept =
          anyMatch(
              groups,
              new Slot(pin.round(), pin.number()),
              group ->
                  pin.hall().map(group.hall()::equals).orElse(true)
                      && pin.start().map(group.start()::equals).orElse(true));
      notes.add(
          kept ? 0 : 1,
          List.of(),
          () ->
              title(given, pin.round(), pin.number()) + " is not where and when its pin puts it.");
    }
    for (Pins.CompetitorPin pin : pins.competitors()) {
      boolean kept =
          anyMatch(
              groups,
              new Slot(pin.round(), pin.number()),
              group -> group.competitors().contains(pin.person()));
      notes.add(
          kept ? 0 : 1,
          List.of(pin.person()),
          () ->
              given.words().name(pin.person())
                  + " does not solve in "
                  + title(given, pin.round(), pin.number())
                  + ", where a pin puts them.");
    }
    for (Pins.DutyPin pin : pins.duties()) {
      boolean kept =
          anyMatch(
              groups,
              new Slot(pin.round(), pin.number()),
              group -> group.crew().in(pin.role()).contains(pin.person()));
      notes.add(
          kept ? 0 : 1,
          List.of(pin.person()),
          () ->
              given.words().name(pin.person())
                  + " is no "
                  + pin.role().word()
                  + " in "
                  + title(given, pin.round(), pin.number())
                  + ", where a pin puts them.");
    }
  }

  private static boolean anyMatch(
      Map<Slot, List<Group>> groups, Slot slot, Predicate<Group> condition) {
    return groups.getOrDefault(slot, List.of()).stream().anyMatch(condition);
  }

  private static String title(Case given, String round, int number) {
    return "group " + number + " of " + given.words().round(round);
  }
}
