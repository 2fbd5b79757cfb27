package roundwright.scheduling.repair;

import java.util.Optional;
import roundwright.scheduling.core.Slot;
import roundwright.scheduling.model.Group;

/**
 * A group of the day plan under repair, where it now stands.
 *
 * @param kept what people were told of it; none for a group that is new
 * @param slot where it stands
 * @param frozen whether it has begun or lies outside what may change
 */
record Standee(Optional<Group> kept, Slot slot, boolean frozen) {
  Standee at(int hall, int stations, int start) {
    int minutes = slot.end() - slot.start();
    return new Standee(
        kept,
        new Slot(slot.round(), slot.number(), hall, stations, start, start + minutes),
        frozen);
  }

  Standee lasting(int minutes) {
    return new Standee(
        kept,
        new Slot(
            slot.round(),
            slot.number(),
            slot.hall(),
            slot.stations(),
            slot.start(),
            slot.start() + minutes),
        frozen);
  }
}
