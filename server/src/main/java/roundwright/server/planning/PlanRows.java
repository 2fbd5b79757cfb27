package roundwright.server.planning;

import static roundwright.server.store.schema.Tables.PLAN;

import java.math.BigDecimal;
import java.math.RoundingMode;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.jooq.TableRecord;
import roundwright.scheduling.bounds.StrainBound;
import roundwright.scheduling.cost.Cost;
import roundwright.scheduling.cost.Finding;
import roundwright.scheduling.cost.Level;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Plan;
import roundwright.scheduling.model.Role;
import roundwright.scheduling.model.Round;
import roundwright.server.ids.EventId;
import roundwright.server.store.Tx;
import roundwright.server.store.schema.tables.records.DutyRecord;
import roundwright.server.store.schema.tables.records.FindingPersonRecord;
import roundwright.server.store.schema.tables.records.FindingRecord;
import roundwright.server.store.schema.tables.records.PlaceRecord;
import roundwright.server.store.schema.tables.records.PlanGroupRecord;

/** Writes a plan down, once and for all. */
final class PlanRows {
  private static final int SCALE = 9;

  private PlanRows() {}

  /** A plan with nothing in it and no score. */
  static long insertEmpty(Tx tx, EventId event) {
    return insertPlan(tx, event, null, Optional.empty());
  }

  /** Writes a plan of the event and gives its id. */
  static long insert(Tx tx, EventId eventId, Event event, Plan plan) {
    Optional<BigDecimal> least =
        StrainBound.of(event, plan).map(bound -> rounded(BigDecimal.valueOf(bound.least())));
    long id = insertPlan(tx, eventId, plan.score().orElse(null), least);
    Map<String, Round> rounds = new HashMap<>();
    event.rounds().forEach(round -> rounds.put(round.id(), round));
    List<PlanGroupRecord> groups = new ArrayList<>();
    List<PlaceRecord> places = new ArrayList<>();
    List<DutyRecord> duties = new ArrayList<>();
    for (Group group : plan.groups()) {
      groups.add(row(id, groups.size(), group, event, rounds.get(group.round())));
      for (String person : group.competitors()) {
        places.add(
            new PlaceRecord()
                .setPlanId(id)
                .setGroupCode(group.id())
                .setPosition(places.size())
                .setPersonCode(person));
      }
      renumber(places, group.competitors().size());
      for (Role role : Role.values()) {
        int position = 0;
        for (String person : group.crew().in(role)) {
          duties.add(
              new DutyRecord()
                  .setPlanId(id)
                  .setGroupCode(group.id())
                  .setRole(role.word())
                  .setPosition(position++)
                  .setPersonCode(person));
        }
      }
    }
    insertAll(tx, groups);
    insertAll(tx, places);
    insertAll(tx, duties);
    insertFindings(tx, id, event, plan.findings());
    return id;
  }

  private static void renumber(List<PlaceRecord> places, int ofLastGroup) {
    for (int i = 0; i < ofLastGroup; i++) {
      places.get(places.size() - ofLastGroup + i).setPosition(i);
    }
  }

  private static long insertPlan(
      Tx tx, EventId event, Cost score, Optional<BigDecimal> leastStrain) {
    return tx.sql()
        .insertInto(PLAN)
        .set(PLAN.EVENT_ID, event.number())
        .set(PLAN.MADE_AT, tx.now())
        .set(PLAN.BREACHES, score == null ? null : score.breaches())
        .set(PLAN.GAPS, score == null ? null : score.gaps())
        .set(PLAN.STRAIN, score == null ? null : rounded(score.strain()))
        .set(PLAN.LEAST_STRAIN, leastStrain.orElse(null))
        .returning(PLAN.ID)
        .fetchSingle(PLAN.ID);
  }

  /** What a plan scored, where it has been priced. */
  static Optional<Cost> score(Tx tx, long plan) {
    return tx.sql()
        .fetchOptional(PLAN, PLAN.ID.eq(plan))
        .filter(row -> row.getBreaches() != null)
        .map(row -> new Cost(row.getBreaches(), row.getGaps(), row.getStrain()));
  }

  private static PlanGroupRecord row(
      long plan, int position, Group group, Event event, Round round) {
    Wanted wanted = Wanted.in(group, round, event.rules());
    return new PlanGroupRecord()
        .setPlanId(plan)
        .setCode(group.id())
        .setPosition(position)
        .setRoundCode(group.round())
        .setNumber(group.number())
        .setHallCode(group.hall())
        .setStations(group.stations())
        .setJudgesWanted(wanted.judges())
        .setScramblersWanted(wanted.scramblers())
        .setRunnersWanted(wanted.runners())
        .setStartsAt(group.start())
        .setEndsAt(group.end());
  }

  private static void insertFindings(Tx tx, long plan, Event event, List<Finding> findings) {
    List<FindingRecord> rows = new ArrayList<>();
    List<FindingPersonRecord> people = new ArrayList<>();
    for (Finding finding : findings) {
      boolean strain = finding.level() == Level.STRAIN;
      BigDecimal weighted =
          strain
              ? finding.amount().multiply(event.rules().weight(finding.rule()))
              : finding.amount();
      int position = rows.size();
      rows.add(
          new FindingRecord()
              .setPlanId(plan)
              .setPosition(position)
              .setRuleLevel(finding.level().word())
              .setRule(finding.rule().word())
              .setAmount(rounded(finding.amount()))
              .setWeighted(rounded(weighted))
              .setGroupCode(finding.group().orElse(null))
              .setSays(finding.says()));
      int place = 0;
      for (String person : finding.people()) {
        people.add(
            new FindingPersonRecord()
                .setPlanId(plan)
                .setFinding(position)
                .setPosition(place++)
                .setPersonCode(person));
      }
    }
    insertAll(tx, rows);
    insertAll(tx, people);
  }

  private static void insertAll(Tx tx, List<? extends TableRecord<?>> rows) {
    if (!rows.isEmpty()) {
      tx.sql().batchInsert(rows).execute();
    }
  }

  private static BigDecimal rounded(BigDecimal amount) {
    return amount.setScale(SCALE, RoundingMode.HALF_UP);
  }
}
