package roundwright.server.planning;

import java.math.BigDecimal;
import java.time.LocalDate;
import java.time.ZonedDateTime;
import java.util.List;
import java.util.Optional;
import roundwright.server.web.EventMark;
import roundwright.server.web.Lanes;
import roundwright.server.web.Ticket;

/**
 * The day plan of a draft: lanes of tickets, what a rule has to say, the search, one group's crew.
 *
 * @param drafts all of the event's, the newest first
 * @param score empty where nothing is planned yet
 * @param leastStrain no plan with this day plan, groups of these sizes and this crew has less;
 *     empty where nothing is proved, as where the plan breaks a rule
 * @param findings the worst first, at most as many as a page can show
 * @param moreFindings how many are left out
 */
public record PlanPage(
    EventMark event,
    DraftMark draft,
    List<DraftMark> drafts,
    LocalDate day,
    Lanes lanes,
    Optional<Score> score,
    Optional<BigDecimal> leastStrain,
    List<FindingLine> findings,
    int moreFindings,
    SolvePanel solve) {
  private static final int STRAIN_SEEN_AT_ONCE = 8;

  public PlanPage {
    drafts = List.copyOf(drafts);
    findings = List.copyOf(findings);
  }

  /** The same page with a search that could not be had, and why. */
  PlanPage withTrouble(String trouble) {
    return new PlanPage(
        event,
        draft,
        drafts,
        day,
        lanes,
        score,
        leastStrain,
        findings,
        moreFindings,
        new SolvePanel(
            solve.state,
            solve.run,
            solve.seed,
            solve.elapsedSeconds,
            solve.wantedSeconds,
            solve.stage,
            solve.first,
            solve.best,
            solve.stillWrong,
            trouble));
  }

  /** Breaches and gaps, and the heaviest of what is only strain: what is to be seen at once. */
  public List<FindingLine> worstFindings() {
    return findings.subList(0, worst());
  }

  /** What is left for whoever wants to know it all. */
  public List<FindingLine> otherFindings() {
    return findings.subList(worst(), findings.size());
  }

  private int worst() {
    long urgent =
        findings.stream()
            .filter(line -> line.level().equals("breach") || line.level().equals("gap"))
            .count();
    return Math.min(findings.size(), (int) urgent + STRAIN_SEEN_AT_ONCE);
  }

  /**
   * A draft.
   *
   * @param publishedEdition number of the newest edition of the event, 0 where none is out
   * @param published true where that edition is this draft as it stands
   */
  public record DraftMark(
      long id,
      int number,
      String name,
      int version,
      ZonedDateTime changedAt,
      int publishedEdition,
      boolean published) {}

  /** A plan's score. */
  public record Score(long breaches, long gaps, BigDecimal strain) {}

  /**
   * What a rule has to say.
   *
   * @param level {@code breach}, {@code gap}, {@code strain} or {@code notice}
   * @param amount for strain its weighted share, else the rule's amount
   * @param rule the rule's word
   * @param says the sentence
   * @param group id of the group concerned, empty where none is
   * @param day that of the group, null where there is none
   */
  public record FindingLine(
      String level, BigDecimal amount, String rule, String says, String group, LocalDate day) {}

  /**
   * A search: asked for, under way or over.
   *
   * @param state {@code idle} before the first, else waiting, running, done, stopped, interrupted,
   *     refused
   * @param run its id, 0 before the first
   * @param stage the engine's word for what it is doing, empty where unknown
   * @param stillWrong words of the rules that the best plan breaks or leaves gaps in
   * @param trouble why it was refused or interrupted, as the end of a sentence's key; else empty
   */
  public record SolvePanel(
      String state,
      long run,
      long seed,
      BigDecimal elapsedSeconds,
      int wantedSeconds,
      String stage,
      Optional<Score> first,
      Optional<Score> best,
      List<String> stillWrong,
      String trouble) {
    public SolvePanel {
      stillWrong = List.copyOf(stillWrong);
    }

    public boolean underWay() {
      return state.equals("waiting") || state.equals("running");
    }
  }

  /** One group with everybody in it. */
  public record GroupCrew(Ticket ticket, List<RoleCrew> roles, List<PersonLine> competitors) {
    public GroupCrew {
      roles = List.copyOf(roles);
      competitors = List.copyOf(competitors);
    }
  }

  /**
   * The people of one role.
   *
   * @param role {@code judge}, {@code scrambler}, {@code runner}
   */
  public record RoleCrew(String role, int wanted, List<PersonLine> people) {
    public RoleCrew {
      people = List.copyOf(people);
    }

    public int missing() {
      return Math.max(0, wanted - people.size());
    }
  }

  /** Somebody, as the organiser knows them. */
  public record PersonLine(String person, String name, boolean newcomer, boolean minor) {}

  /** The crews of a draft: all groups of a day to choose from, and the one chosen. */
  public record CrewsPage(
      EventMark event,
      DraftMark draft,
      LocalDate day,
      Optional<Score> score,
      List<Ticket> tickets,
      Optional<GroupCrew> chosen) {
    public CrewsPage {
      tickets = List.copyOf(tickets);
    }
  }

  /**
   * What publishing would do, to be checked before it is done.
   *
   * @param edition the number that the edition would get
   * @param groups how many groups it holds
   * @param people how many people have a commitment in it
   * @param changed how many people have another commitment than in the newest edition; all of them
   *     where none is out
   */
  public record PublishPage(
      EventMark event,
      DraftMark draft,
      Score score,
      int edition,
      int groups,
      int people,
      int changed) {}
}
