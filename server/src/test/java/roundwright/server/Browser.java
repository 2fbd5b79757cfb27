package roundwright.server;

import java.io.IOException;
import java.net.CookieManager;
import java.net.CookiePolicy;
import java.net.HttpCookie;
import java.net.URI;
import java.net.URLEncoder;
import java.net.http.HttpClient;
import java.net.http.HttpRequest;
import java.net.http.HttpResponse;
import java.net.http.HttpResponse.BodyHandlers;
import java.nio.charset.StandardCharsets;
import java.util.Arrays;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import java.util.stream.Collectors;

/** Somebody at a browser without scripts: keeps cookies, sends forms with the token they carry. */
public final class Browser {
  private static final Pattern TOKEN = Pattern.compile("name=\"token\" value=\"([^\"]+)\"");

  private final String root;
  private final CookieManager cookies = new CookieManager(null, CookiePolicy.ACCEPT_ALL);
  private final HttpClient client =
      HttpClient.newBuilder()
          .version(HttpClient.Version.HTTP_1_1)
          .cookieHandler(cookies)
          .followRedirects(HttpClient.Redirect.NEVER)
          .build();

  public Browser(App app) {
    this.root = "http://127.0.0.1:" + app.port();
  }

  /** Opens a page, without following where it leads. */
  public HttpResponse<String> get(String path, String... headers) {
    HttpRequest.Builder request = HttpRequest.newBuilder(URI.create(root + path)).GET();
    return send(request, headers);
  }

  /** What htmx asks for. */
  public HttpResponse<String> fragment(String path) {
    return get(path, "HX-Request", "true");
  }

  public HttpResponse<String> send(String method, String path, String body, String... headers) {
    HttpRequest.Builder request =
        HttpRequest.newBuilder(URI.create(root + path))
            .method(method, HttpRequest.BodyPublishers.ofString(body))
            .header("Content-Type", "application/x-www-form-urlencoded");
    return send(request, headers);
  }

  /** Sends the form at a page to an address, with the page's token. */
  public HttpResponse<String> submit(
      String page, String path, Map<String, String> fields, String... headers) {
    Map<String, String> all = new TreeMap<>(fields);
    all.put("token", tokenAt(page));
    return send("POST", path, encoded(all), headers);
  }

  public String tokenAt(String page) {
    HttpResponse<String> shown = get(page);
    Matcher token = TOKEN.matcher(shown.body());
    if (!token.find()) {
      throw new AssertionError(
          "No form at " + page + " (status " + shown.statusCode() + "): " + shown.body());
    }
    return token.group(1);
  }

  public static String encoded(Map<String, String> fields) {
    return fields.entrySet().stream()
        .map(field -> encode(field.getKey()) + "=" + encode(field.getValue()))
        .collect(Collectors.joining("&"));
  }

  private static String encode(String text) {
    return URLEncoder.encode(text, StandardCharsets.UTF_8);
  }

  public List<HttpCookie> cookies() {
    return cookies.getCookieStore().getCookies();
  }

  public void forget() {
    cookies.getCookieStore().removeAll();
  }

  private HttpResponse<String> send(HttpRequest.Builder request, String... headers) {
    for (int i = 0; i < headers.length; i += 2) {
      request.header(headers[i], headers[i + 1]);
    }
    try {
      return client.send(request.build(), BodyHandlers.ofString(StandardCharsets.UTF_8));
    } catch (IOException e) {
      throw new AssertionError("No answer: " + Arrays.toString(headers), e);
    } catch (InterruptedException e) {
      Thread.currentThread().interrupt();
      throw new AssertionError(e);
    }
  }
}
