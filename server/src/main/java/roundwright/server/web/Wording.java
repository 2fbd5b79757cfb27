package roundwright.server.web;

import java.math.BigDecimal;
import java.text.NumberFormat;
import java.time.LocalDate;
import java.time.LocalTime;
import java.time.ZonedDateTime;
import java.time.format.DateTimeFormatter;
import java.time.temporal.TemporalAccessor;
import java.util.Locale;

/** Times, days and figures as templates write them: {@code ${wording.clock(...)}}. */
public final class Wording {
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
  public String stopwatch(BigDecimal seconds) {
    long whole = seconds.longValue();
    return String.format(Locale.ROOT, "%d:%02d", whole / 60, whole % 60);
  }

  public String number(Number number) {
    NumberFormat format = NumberFormat.getNumberInstance(locale);
    format.setMaximumFractionDigits(1);
    return format.format(number);
  }

  /** Classes that place something on an axis of time: {@code h9 m20 for25}. */
  public String slot(LocalTime from, long minutes) {
    return "h" + from.getHour() + " m" + from.getMinute() + " for" + minutes;
  }

  /** What is wrong with a field. */
  public String complaint(FieldErrors.FieldError error) {
    return messages.say(locale, error.key(), error.filled().toArray());
  }

  /** A sentence whose key is only known when the page is made. */
  public String say(String key, Object... filled) {
    return messages.say(locale, key, filled);
  }

  private DateTimeFormatter form(String key) {
    return DateTimeFormatter.ofPattern(messages.say(locale, key), locale);
  }
}
