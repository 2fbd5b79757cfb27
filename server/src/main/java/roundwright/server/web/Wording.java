package roundwright.server.web;

import java.text.NumberFormat;
import java.time.Duration;
import java.time.LocalDate;
import java.time.LocalTime;
import java.time.ZonedDateTime;
import java.time.format.DateTimeFormatter;
import java.time.temporal.ChronoUnit;
import java.time.temporal.TemporalAccessor;
import java.util.Locale;

/** Times, days and figures as templates write them: {@code ${wording.clock(...)}}. */
public final class Wording {
  private static final long MINUTES_SAID_AS_SUCH = 120;

  private final Messages messages;
  private final Locale locale;

  Wording(Messages messages, Locale locale) {
    this.messages = messages;
    this.locale = locale;
  }

  /** A time of day, without seconds. */
  public String clock(TemporalAccessor time) {
    return form("form.clock").format(time);
  }

  /** A weekday. */
  public String weekday(LocalDate day) {
    return form("form.weekday").format(day);
  }

  /** A day without its year. */
  public String day(TemporalAccessor day) {
    return form("form.day").format(day);
  }

  /** A day with its year. */
  public String date(TemporalAccessor day) {
    return form("form.date").format(day);
  }

  /** A day and a time of day. */
  public String moment(ZonedDateTime moment) {
    return form("form.moment").format(moment);
  }

  /** A time as programs read it, for {@code datetime} attributes. */
  public String exact(ZonedDateTime moment) {
    return DateTimeFormatter.ISO_OFFSET_DATE_TIME.format(moment);
  }

  /** A zone's distance from UTC at a moment, such as {@code UTC+1}. */
  public String zone(ZonedDateTime moment) {
    return DateTimeFormatter.ofPattern("'UTC'x", Locale.ROOT).format(moment).replace("+0", "+");
  }

  /** Minutes and seconds of a stretch of time. */
  public String stopwatch(Number seconds) {
    long whole = seconds.longValue();
    return String.format(Locale.ROOT, "%d:%02d", whole / 60, whole % 60);
  }

  public String number(Number number) {
    NumberFormat format = NumberFormat.getNumberInstance(locale);
    format.setMaximumFractionDigits(1);
    return format.format(number);
  }

  /** A full hour of an axis of time; the hours after midnight go on from 24. */
  public String hour(int hour) {
    return clock(LocalTime.of(hour % 24, 0));
  }

  /** The days from one to another, the year once. */
  public String span(LocalDate first, LocalDate last) {
    if (first.equals(last)) {
      return date(first);
    }
    return messages.say(locale, spanKey(first, last), day(first), date(last));
  }

  /** The same without weekdays, and the month once where it is one. */
  public String shortSpan(LocalDate first, LocalDate last) {
    String year = " " + last.getYear();
    if (first.equals(last)) {
      return form("form.month").format(first) + year;
    }
    boolean sameMonth = first.getMonth() == last.getMonth() && first.getYear() == last.getYear();
    String start = form(sameMonth ? "form.day-of-month" : "form.month").format(first);
    return messages.say(
        locale, spanKey(first, last), start, form("form.month").format(last) + year);
  }

  private static String spanKey(LocalDate first, LocalDate last) {
    return first.plusDays(1).equals(last) ? "form.span.two" : "form.span";
  }

  /** How long it is from now to a moment, as precisely as helps: minutes, hours or days. */
  public String ahead(ZonedDateTime now, ZonedDateTime moment) {
    long minutes = Duration.between(now, moment).toMinutes();
    if (minutes < 1) {
      return messages.say(locale, "ahead.now");
    }
    if (minutes < MINUTES_SAID_AS_SUCH) {
      return messages.say(locale, "ahead.minutes", minutes);
    }
    long days =
        ChronoUnit.DAYS.between(
            now.toLocalDate(), moment.withZoneSameInstant(now.getZone()).toLocalDate());
    if (days < 1) {
      return messages.say(locale, "ahead.hours", (minutes + 30) / 60);
    }
    return messages.say(locale, "ahead.days", days);
  }

  /** What is wrong with a field. */
  public String complaint(FieldErrors.FieldError error) {
    return messages.say(locale, error.key(), error.filled().toArray());
  }

  /** A sentence whose key is only known when the page is made. */
  public String say(String key) {
    return messages.say(locale, key);
  }

  /** The same with places to fill. */
  public String say(String key, Object... filled) {
    return messages.say(locale, key, filled);
  }

  private DateTimeFormatter form(String key) {
    return DateTimeFormatter.ofPattern(messages.say(locale, key), locale);
  }
}
