package roundwright.server.planning;

import static org.jooq.impl.DSL.coalesce;
import static org.jooq.impl.DSL.field;
import static org.jooq.impl.DSL.inline;
import static org.jooq.impl.DSL.max;
import static org.jooq.impl.DSL.multiset;
import static org.jooq.impl.DSL.select;
import static org.jooq.impl.DSL.sum;
import static roundwright.server.store.schema.Tables.DRAFT;
import static roundwright.server.store.schema.Tables.DUTY;
import static roundwright.server.store.schema.Tables.EDITION;
import static roundwright.server.store.schema.Tables.FINDING;
import static roundwright.server.store.schema.Tables.PERSON;
import static roundwright.server.store.schema.Tables.PLACE;
import static roundwright.server.store.schema.Tables.PLAN;
import static roundwright.server.store.schema.Tables.PLAN_GROUP;
import static roundwright.server.store.schema.Tables.SOLVE_RUN;

import java.math.BigDecimal;
import java.time.Instant;
import java.time.LocalDate;
import java.time.ZoneId;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashMap;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import org.jooq.Field;
import org.jooq.Record;
import org.jooq.Result;
import org.jooq.impl.DSL;
import roundwright.server.ids.EventId;
import roundwright.server.planning.PlanPage.CrewsPage;
import roundwright.server.planning.PlanPage.DraftMark;
import roundwright.server.planning.PlanPage.FindingLine;
import roundwright.server.planning.PlanPage.GroupCrew;
import roundwright.server.planning.PlanPage.PersonLine;
import roundwright.server.planning.PlanPage.PublishPage;
import roundwright.server.planning.PlanPage.RoleCrew;
import roundwright.server.planning.PlanPage.Score;
import roundwright.server.planning.PlanPage.SolvePanel;
import roundwright.server.store.Database;
import roundwright.server.store.Tx;
import roundwright.server.store.schema.tables.SolveRun;
import roundwright.server.ticket.Frame;
import roundwright.server.ticket.LaneMaker;
import roundwright.server.ticket.TicketReads;
import roundwright.server.web.Ticket;
import roundwright.server.web.Visitor.EventName;

/** What the organiser's planning pages show, read in at most three queries a page. */
public final class PlanningReads {
  private static final int MOST_FINDINGS = 60;
  private static final Field<BigDecimal> BREACHES = found("breach");
  private static final Field<BigDecimal> GAPS = found("gap");
  private static final SolveRun RUNS_OF_DRAFT = SOLVE_RUN.as("runs_of_draft");
  private static final SolvePanel IDLE =
      new SolvePanel(
          "idle", 0, 1, BigDecimal.ZERO, 0, "", Optional.empty(), Optional.empty(), List.of(), "");
  private static final List<String> ROLES = List.of("judge", "scrambler", "runner");

  private final Database database;

  public PlanningReads(Database database) {
    this.database = database;
  }

  private static Field<BigDecimal> found(String level) {
    return field(
            select(coalesce(sum(FINDING.AMOUNT), inline(BigDecimal.ZERO)))
                .from(FINDING)
                .where(FINDING.PLAN_ID.eq(PLAN_GROUP.PLAN_ID))
                .and(FINDING.GROUP_CODE.eq(PLAN_GROUP.CODE))
                .and(FINDING.RULE_LEVEL.eq(inline(level))))
        .as(level + "_found");
  }

  /** The number of the event's newest draft. */
  public Optional<Integer> newestDraft(EventId event) {
    return database.read(
        tx ->
            Optional.ofNullable(
                tx.sql()
                    .select(max(DRAFT.NUMBER))
                    .from(DRAFT)
                    .where(DRAFT.EVENT_ID.eq(event.number()))
                    .fetchSingle()
                    .value1()));
  }

  /** An event's drafts, the newest first, read along with its frame. */
  private record Drafts(Frame frame, List<DraftRow> rows) {
    /** The one asked for, else the newest; empty where there is none of that number. */
    Optional<DraftRow> chosen(Optional<Integer> number) {
      return rows.stream()
          .filter(row -> number.isEmpty() || row.mark().number() == number.get())
          .findFirst();
    }

    List<DraftMark> marks() {
      return rows.stream().map(DraftRow::mark).toList();
    }
  }

  private record DraftRow(
      DraftMark mark,
      long planId,
      Optional<Score> score,
      Optional<BigDecimal> leastStrain,
      SolvePanel panel) {}

  private static Drafts drafts(Tx tx, EventName event) {
    Field<Integer> newestEdition =
        field(
            select(max(EDITION.NUMBER))
                .from(EDITION)
                .where(EDITION.EVENT_ID.eq(event.id().number())));
    Field<Long> newestRun =
        field(
            select(max(RUNS_OF_DRAFT.ID))
                .from(RUNS_OF_DRAFT)
                .where(RUNS_OF_DRAFT.DRAFT_ID.eq(DRAFT.ID)));
    List<Field<?>> columns =
        new ArrayList<>(
            List.of(
                DRAFT.ID,
                DRAFT.NUMBER,
                DRAFT.NAME,
                DRAFT.VERSION,
                DRAFT.CHANGED_AT,
                DRAFT.PLAN_ID,
                PLAN.BREACHES,
                PLAN.GAPS,
                PLAN.STRAIN,
                PLAN.LEAST_STRAIN,
                EDITION.NUMBER,
                EDITION.PLAN_ID));
    columns.addAll(List.of(SOLVE_RUN.fields()));
    TicketReads.With<List<DraftRow>> read =
        TicketReads.frame(
            tx,
            event.id(),
            multiset(
                    select(columns)
                        .from(DRAFT)
                        .join(PLAN)
                        .on(PLAN.ID.eq(DRAFT.PLAN_ID))
                        .leftJoin(EDITION)
                        .on(EDITION.EVENT_ID.eq(DRAFT.EVENT_ID))
                        .and(EDITION.NUMBER.eq(newestEdition))
                        .leftJoin(SOLVE_RUN)
                        .on(SOLVE_RUN.ID.eq(newestRun))
                        .where(DRAFT.EVENT_ID.eq(event.id().number()))
                        .orderBy(DRAFT.NUMBER.desc()))
                .convertFrom(rows -> rows.map(row -> draftRow(row, event.zone(), tx.now()))));
    return new Drafts(
        read.frame(),
        read.more().isEmpty() ? List.of(noneYet(event.zone(), tx.now())) : read.more());
  }

  /** What an event without drafts shows: the draft that its first change makes. */
  private static DraftRow noneYet(ZoneId zone, Instant now) {
    return new DraftRow(
        new DraftMark(0, PlanningWrites.FIRST, "", 0, now.atZone(zone), 0, false),
        0,
        Optional.empty(),
        Optional.empty(),
        IDLE);
  }

  private static DraftRow draftRow(Record row, ZoneId zone, Instant now) {
    Integer edition = row.get(EDITION.NUMBER);
    DraftMark mark =
        new DraftMark(
            row.get(DRAFT.ID),
            row.get(DRAFT.NUMBER),
            row.get(DRAFT.NAME),
            row.get(DRAFT.VERSION),
            row.get(DRAFT.CHANGED_AT).atZone(zone),
            edition == null ? 0 : edition,
            row.get(DRAFT.PLAN_ID).equals(row.get(EDITION.PLAN_ID)));
    return new DraftRow(
        mark,
        row.get(DRAFT.PLAN_ID),
        score(row.get(PLAN.BREACHES), row.get(PLAN.GAPS), row.get(PLAN.STRAIN)),
        Optional.ofNullable(row.get(PLAN.LEAST_STRAIN)),
        row.get(SOLVE_RUN.ID) == null ? IDLE : panel(row, now));
  }

  private static Optional<Score> score(Long breaches, Long gaps, BigDecimal strain) {
    return breaches == null ? Optional.empty() : Optional.of(new Score(breaches, gaps, strain));
  }

  /** The day plan of a draft; empty where there is no such draft. */
  public Optional<PlanPage> planPage(
      EventName event, Optional<Integer> number, Optional<LocalDate> asked) {
    return database.read(
        tx -> {
          Drafts drafts = drafts(tx, event);
          Optional<DraftRow> draft = drafts.chosen(number);
          if (draft.isEmpty()) {
            return Optional.empty();
          }
          Frame frame = drafts.frame();
          LocalDate today = tx.now().atZone(event.zone()).toLocalDate();
          LocalDate day = frame.day(asked, today);
          List<Ticket> tickets = tickets(tx, draft.get().planId(), frame);
          List<FindingLine> findings = findings(tx, draft.get().planId(), tickets);
          return Optional.of(
              new PlanPage(
                  frame.mark(event, today),
                  draft.get().mark(),
                  drafts.marks(),
                  day,
                  new LaneMaker(frame, event.zone()).byGroup(tickets, day),
                  draft.get().score(),
                  draft.get().leastStrain(),
                  findings.stream().limit(MOST_FINDINGS).toList(),
                  Math.max(0, findings.size() - MOST_FINDINGS),
                  draft.get().panel()));
        });
  }

  private static List<Ticket> tickets(Tx tx, long planId, Frame frame) {
    List<Field<?>> columns = new ArrayList<>(TicketReads.columns());
    columns.addAll(List.of(BREACHES, GAPS));
    return tx.sql()
        .select(columns)
        .from(PLAN_GROUP)
        .where(PLAN_GROUP.PLAN_ID.eq(planId))
        .orderBy(TicketReads.inOrder())
        .fetch(
            row ->
                TicketReads.ticket(row, frame)
                    .withFound(row.get(BREACHES).longValue(), row.get(GAPS).longValue()));
  }

  /** All findings of a plan, the worst level first and in it the heaviest. */
  private static List<FindingLine> findings(Tx tx, long planId, List<Ticket> tickets) {
    Map<String, LocalDate> days = new HashMap<>();
    tickets.forEach(ticket -> days.put(ticket.group(), ticket.start().toLocalDate()));
    List<String> levels = List.of("breach", "gap", "strain", "notice");
    return tx
        .sql()
        .select(
            FINDING.RULE_LEVEL, FINDING.WEIGHTED, FINDING.RULE, FINDING.SAYS, FINDING.GROUP_CODE)
        .from(FINDING)
        .where(FINDING.PLAN_ID.eq(planId))
        .orderBy(FINDING.WEIGHTED.desc(), FINDING.POSITION)
        .fetch(
            row ->
                new FindingLine(
                    row.value1(),
                    row.value2(),
                    row.value3(),
                    row.value4(),
                    Optional.ofNullable(row.value5()).orElse(""),
                    days.get(row.value5())))
        .stream()
        .sorted(Comparator.comparingInt(line -> levels.indexOf(line.level())))
        .toList();
  }

  private static SolvePanel panel(Record row, Instant now) {
    String state = row.get(SOLVE_RUN.STATE);
    boolean underWay = state.equals("running") || state.equals("waiting");
    boolean lost = underWay && row.get(SOLVE_RUN.BEAT_AT).isBefore(now.minus(SolveRuns.SILENCE));
    return new SolvePanel(
        lost ? "interrupted" : state,
        row.get(SOLVE_RUN.ID),
        row.get(SOLVE_RUN.SEED),
        Optional.ofNullable(row.get(SOLVE_RUN.ELAPSED_SECONDS)).orElse(BigDecimal.ZERO),
        row.get(SOLVE_RUN.WANTED_SECONDS),
        Optional.ofNullable(row.get(SOLVE_RUN.STAGE)).orElse(""),
        score(
            row.get(SOLVE_RUN.FIRST_BREACHES),
            row.get(SOLVE_RUN.FIRST_GAPS),
            row.get(SOLVE_RUN.FIRST_STRAIN)),
        score(
            row.get(SOLVE_RUN.BEST_BREACHES),
            row.get(SOLVE_RUN.BEST_GAPS),
            row.get(SOLVE_RUN.BEST_STRAIN)),
        Optional.ofNullable(row.get(SOLVE_RUN.STILL_WRONG)).orElse("").lines().toList(),
        lost ? "restart" : Optional.ofNullable(row.get(SOLVE_RUN.TROUBLE)).orElse(""));
  }

  /**
   * The crews of a draft: a day's groups, and one of them with everybody in it.
   *
   * @param group the lasting id of the one asked for; else none is chosen
   * @return empty where there is no such draft, or no such group in it
   */
  public Optional<CrewsPage> crewsPage(
      EventName event,
      Optional<Integer> number,
      Optional<LocalDate> asked,
      Optional<String> group) {
    return database.read(
        tx -> {
          Drafts drafts = drafts(tx, event);
          Optional<DraftRow> draft = drafts.chosen(number);
          if (draft.isEmpty()) {
            return Optional.empty();
          }
          Frame frame = drafts.frame();
          LocalDate today = tx.now().atZone(event.zone()).toLocalDate();
          List<Ticket> all = tickets(tx, draft.get().planId(), frame);
          Optional<Ticket> wanted =
              group.flatMap(
                  code -> all.stream().filter(one -> one.group().equals(code)).findFirst());
          if (group.isPresent() && wanted.isEmpty()) {
            return Optional.empty();
          }
          LocalDate day =
              wanted.map(ticket -> ticket.start().toLocalDate()).orElse(frame.day(asked, today));
          List<Ticket> tickets =
              all.stream().filter(one -> one.start().toLocalDate().equals(day)).toList();
          return Optional.of(
              new CrewsPage(
                  frame.mark(event, today),
                  draft.get().mark(),
                  day,
                  draft.get().score(),
                  tickets,
                  wanted.map(ticket -> crew(tx, event.id(), draft.get().planId(), ticket))));
        });
  }

  private static GroupCrew crew(Tx tx, EventId event, long planId, Ticket ticket) {
    Map<String, List<PersonLine>> byPart = new HashMap<>();
    tx.sql()
        .select(
            PLACE.PERSON_CODE,
            inline("competitor").as("part"),
            PLACE.POSITION.as("place"),
            PERSON.NAME,
            PERSON.NEWCOMER,
            PERSON.MINOR)
        .from(PLACE)
        .leftJoin(PERSON)
        .on(PERSON.EVENT_ID.eq(event.number()))
        .and(PERSON.CODE.eq(PLACE.PERSON_CODE))
        .where(PLACE.PLAN_ID.eq(planId))
        .and(PLACE.GROUP_CODE.eq(ticket.group()))
        .unionAll(
            select(
                    DUTY.PERSON_CODE,
                    DUTY.ROLE,
                    DUTY.POSITION,
                    PERSON.NAME,
                    PERSON.NEWCOMER,
                    PERSON.MINOR)
                .from(DUTY)
                .leftJoin(PERSON)
                .on(PERSON.EVENT_ID.eq(event.number()))
                .and(PERSON.CODE.eq(DUTY.PERSON_CODE))
                .where(DUTY.PLAN_ID.eq(planId))
                .and(DUTY.GROUP_CODE.eq(ticket.group())))
        .orderBy(DSL.field(DSL.name("place")))
        .forEach(
            row ->
                byPart
                    .computeIfAbsent(row.value2(), unused -> new ArrayList<>())
                    .add(
                        new PersonLine(
                            row.value1(),
                            Optional.ofNullable(row.value4()).orElse(row.value1()),
                            Boolean.TRUE.equals(row.value5()),
                            Boolean.TRUE.equals(row.value6()))));
    List<RoleCrew> roles = new ArrayList<>();
    for (String role : ROLES) {
      ticket.crew().stream()
          .filter(one -> one.role().equals(role))
          .forEach(
              one ->
                  roles.add(
                      new RoleCrew(role, one.wanted(), byPart.getOrDefault(role, List.of()))));
    }
    return new GroupCrew(ticket, roles, byPart.getOrDefault("competitor", List.of()));
  }

  /** What publishing a draft would do; empty where there is no such draft or nothing planned. */
  public Optional<PublishPage> publishPage(EventName event, Optional<Integer> number) {
    return database.read(
        tx -> {
          Drafts drafts = drafts(tx, event);
          Optional<DraftRow> draft = drafts.chosen(number);
          if (draft.isEmpty() || draft.get().score().isEmpty()) {
            return Optional.empty();
          }
          Frame frame = drafts.frame();
          Map<Long, Map<String, Set<Object>>> days = commitments(tx, event, draft.get().planId());
          Map<String, Set<Object>> here = days.getOrDefault(draft.get().planId(), Map.of());
          Map<String, Set<Object>> out =
              days.entrySet().stream()
                  .filter(one -> one.getKey() != draft.get().planId())
                  .map(Map.Entry::getValue)
                  .findFirst()
                  .orElse(draft.get().mark().published() ? here : Map.of());
          Set<String> people = new HashSet<>(here.keySet());
          people.addAll(out.keySet());
          people.removeIf(
              person ->
                  here.getOrDefault(person, Set.of()).equals(out.getOrDefault(person, Set.of())));
          int groups = tx.sql().fetchCount(PLAN_GROUP, PLAN_GROUP.PLAN_ID.eq(draft.get().planId()));
          return Optional.of(
              new PublishPage(
                  frame.mark(event, tx.now().atZone(event.zone()).toLocalDate()),
                  draft.get().mark(),
                  draft.get().score().get(),
                  draft.get().mark().publishedEdition() + 1,
                  groups,
                  here.size(),
                  people.size()));
        });
  }

  /** One thing somebody is at, as far as they would notice a change. */
  private record Seen(String part, String round, String hall, Instant start, Instant end) {}

  /** Who is at what in a draft's plan and in the newest edition's, by plan and person. */
  private static Map<Long, Map<String, Set<Object>>> commitments(
      Tx tx, EventName event, long planId) {
    Field<Long> published =
        field(
            select(EDITION.PLAN_ID)
                .from(EDITION)
                .where(EDITION.EVENT_ID.eq(event.id().number()))
                .orderBy(EDITION.NUMBER.desc())
                .limit(1));
    Result<? extends Record> rows =
        tx.sql()
            .select(
                PLACE.PLAN_ID,
                PLACE.PERSON_CODE,
                inline("competitor"),
                PLAN_GROUP.ROUND_CODE,
                PLAN_GROUP.HALL_CODE,
                PLAN_GROUP.STARTS_AT,
                PLAN_GROUP.ENDS_AT)
            .from(PLACE)
            .join(PLAN_GROUP)
            .on(PLAN_GROUP.PLAN_ID.eq(PLACE.PLAN_ID))
            .and(PLAN_GROUP.CODE.eq(PLACE.GROUP_CODE))
            .where(PLACE.PLAN_ID.eq(planId).or(PLACE.PLAN_ID.eq(published)))
            .unionAll(
                select(
                        DUTY.PLAN_ID,
                        DUTY.PERSON_CODE,
                        DUTY.ROLE,
                        PLAN_GROUP.ROUND_CODE,
                        PLAN_GROUP.HALL_CODE,
                        PLAN_GROUP.STARTS_AT,
                        PLAN_GROUP.ENDS_AT)
                    .from(DUTY)
                    .join(PLAN_GROUP)
                    .on(PLAN_GROUP.PLAN_ID.eq(DUTY.PLAN_ID))
                    .and(PLAN_GROUP.CODE.eq(DUTY.GROUP_CODE))
                    .where(DUTY.PLAN_ID.eq(planId).or(DUTY.PLAN_ID.eq(published))))
            .fetch();
    Map<Long, Map<String, Set<Object>>> byPlan = new HashMap<>();
    for (Record row : rows) {
      byPlan
          .computeIfAbsent(row.get(0, Long.class), unused -> new HashMap<>())
          .computeIfAbsent(row.get(1, String.class), unused -> new HashSet<>())
          .add(
              new Seen(
                  row.get(2, String.class),
                  row.get(3, String.class),
                  row.get(4, String.class),
                  row.get(5, Instant.class),
                  row.get(6, Instant.class)));
    }
    return byPlan;
  }
}
