package roundwright.server.web;

import java.util.Collections;
import java.util.LinkedHashMap;
import java.util.Map;
import java.util.Optional;

/**
 * What a handler wants shown: a template, what it needs to know, and the fragment of it that htmx
 * gets when it asks for less than a page.
 */
public record View(String template, Optional<String> fragment, Map<String, Object> model) {
  public View {
    model = Collections.unmodifiableMap(new LinkedHashMap<>(model));
  }

  public static View of(String template) {
    return new View(template, Optional.empty(), Map.of());
  }

  public View with(String name, Object shown) {
    Map<String, Object> more = new LinkedHashMap<>(model);
    more.put(name, shown);
    return new View(template, fragment, more);
  }

  /** Names the fragment, by its {@code th:fragment}, that stands for the page in htmx's answers. */
  public View orFragment(String name) {
    return new View(template, Optional.of(name), model);
  }
}
