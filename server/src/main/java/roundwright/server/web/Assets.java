package roundwright.server.web;

import io.javalin.http.ContentType;
import io.javalin.http.Context;
import io.javalin.http.HttpStatus;
import io.javalin.http.NotFoundResponse;
import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.io.InputStream;
import java.io.UncheckedIOException;
import java.net.URI;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.HexFormat;
import java.util.Map;
import java.util.Optional;
import java.util.Properties;
import java.util.Set;
import java.util.concurrent.ConcurrentHashMap;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import java.util.zip.GZIPOutputStream;

/**
 * Style sheets, scripts, faces and icons: read once, zipped once, served under an address with
 * their hash in it, which browsers may keep for ever. In development they are read afresh.
 */
public final class Assets {
  /** Where they are served. */
  public static final String PATH = "/static/";

  private static final Pattern PLAIN = Pattern.compile("[A-Za-z0-9_-]+([./][A-Za-z0-9_-]+)*");
  private static final Pattern NAMED_FILE =
      Pattern.compile("@import \"(?<import>[^\"]+)\";|url\\(\"(?<url>[^\"]+)\"\\)");
  private static final Set<String> ZIPPED = Set.of("css", "js", "svg", "txt", "json");
  private static final Map<String, Vendored> VENDORED =
      Map.of(
          "js/htmx.js", new Vendored("htmx.org", "dist/htmx.min.js"),
          "js/htmx-sse.js", new Vendored("htmx-ext-sse", "sse.js"));

  private final Optional<Path> devRoot;
  private final Map<String, Optional<Asset>> known = new ConcurrentHashMap<>();

  public Assets(Optional<Path> devRoot) {
    this.devRoot = devRoot;
  }

  /** A script that comes with a library. */
  private record Vendored(String webjar, String file) {}

  private static final class Asset {
    final byte[] content;
    final Optional<byte[]> zipped;
    final String hash;
    final String mimeType;

    Asset(byte[] content, Optional<byte[]> zipped, String hash, String mimeType) {
      this.content = content;
      this.zipped = zipped;
      this.hash = hash;
      this.mimeType = mimeType;
    }
  }

  /**
   * The address of an asset, to be kept for ever by whoever fetches it.
   *
   * @throws IllegalArgumentException where there is no such file
   */
  public String url(String name) {
    Asset asset =
        find(name)
            .orElseThrow(() -> new IllegalArgumentException("There is no file static/" + name));
    return PATH + name + "?v=" + asset.hash;
  }

  /** Serves {@code /static/<name>}. */
  public void serve(Context ctx) {
    Asset asset = find(ctx.pathParam("name")).orElseThrow(NotFoundResponse::new);
    String tag = '"' + asset.hash + '"';
    ctx.header("ETag", tag);
    ctx.header("Vary", "Accept-Encoding");
    ctx.header(
        "Cache-Control",
        asset.hash.equals(ctx.queryParam("v"))
            ? "public, max-age=31536000, immutable"
            : "no-cache");
    if (tag.equals(ctx.header("If-None-Match"))) {
      ctx.status(HttpStatus.NOT_MODIFIED);
      return;
    }
    ctx.contentType(asset.mimeType);
    String accepted = ctx.header("Accept-Encoding");
    if (asset.zipped.isPresent() && accepted != null && accepted.contains("gzip")) {
      ctx.header("Content-Encoding", "gzip");
      ctx.result(asset.zipped.get());
    } else {
      ctx.result(asset.content);
    }
  }

  private Optional<Asset> find(String name) {
    if (!PLAIN.matcher(name).matches()) {
      return Optional.empty();
    }
    if (devRoot.isPresent()) {
      return load(name);
    }
    Optional<Asset> held = known.get(name);
    if (held == null) {
      // Loading a style sheet loads the files it names, so this cannot happen inside the map.
      held = load(name);
      known.put(name, held);
    }
    return held;
  }

  private Optional<Asset> load(String name) {
    try (InputStream in = open(name)) {
      if (in == null) {
        return Optional.empty();
      }
      byte[] content = in.readAllBytes();
      String ending = name.substring(name.lastIndexOf('.') + 1);
      if (ending.equals("css")) {
        content = joined(name, content).getBytes(StandardCharsets.UTF_8);
      }
      Optional<byte[]> zipped =
          ZIPPED.contains(ending) ? Optional.of(zip(content)) : Optional.empty();
      return Optional.of(new Asset(content, zipped, hash(content), mimeType(ending)));
    } catch (IOException e) {
      throw new UncheckedIOException("Cannot read static/" + name, e);
    }
  }

  /**
   * A style sheet with those that it imports put in their place, so that a page needs one request
   * for all of its style; the files it names get addresses that may be kept for ever.
   */
  private String joined(String name, byte[] content) throws IOException {
    String text = new String(content, StandardCharsets.UTF_8);
    StringBuilder whole = new StringBuilder();
    Matcher named = NAMED_FILE.matcher(text);
    while (named.find()) {
      String file =
          resolved(
              name, named.group("import") == null ? named.group("url") : named.group("import"));
      String put;
      if (named.group("import") == null) {
        put = "url(\"" + url(file) + "\")";
      } else {
        try (InputStream in = open(file)) {
          if (in == null) {
            throw new IOException(name + " imports " + file + ", which is not there");
          }
          put = joined(file, in.readAllBytes());
        }
      }
      named.appendReplacement(whole, Matcher.quoteReplacement(put));
    }
    return named.appendTail(whole).toString();
  }

  private static String resolved(String from, String relative) {
    return URI.create(from).resolve(relative).toString();
  }

  private InputStream open(String name) throws IOException {
    Vendored vendored = VENDORED.get(name);
    if (vendored != null) {
      return resource(
          "META-INF/resources/webjars/"
              + vendored.webjar()
              + "/"
              + version(vendored.webjar())
              + "/"
              + vendored.file());
    }
    if (devRoot.isPresent()) {
      Path file = devRoot.get().resolve("static").resolve(name);
      return Files.isRegularFile(file) ? Files.newInputStream(file) : null;
    }
    return resource("static/" + name);
  }

  private static String version(String webjar) throws IOException {
    Properties pom = new Properties();
    try (InputStream in =
        resource("META-INF/maven/org.webjars.npm/" + webjar + "/pom.properties")) {
      if (in == null) {
        throw new IOException("The jar does not say which version of " + webjar + " it holds");
      }
      pom.load(in);
    }
    return pom.getProperty("version");
  }

  private static InputStream resource(String path) {
    return Assets.class.getClassLoader().getResourceAsStream(path);
  }

  private static byte[] zip(byte[] content) throws IOException {
    ByteArrayOutputStream out = new ByteArrayOutputStream();
    try (GZIPOutputStream zip = new GZIPOutputStream(out)) {
      zip.write(content);
    }
    return out.toByteArray();
  }

  private static String hash(byte[] content) {
    String whole =
        HexFormat.of().formatHex(Tokens.sha256(new String(content, StandardCharsets.ISO_8859_1)));
    return whole.substring(0, 12);
  }

  private static String mimeType(String ending) {
    ContentType type = ContentType.contentTypeByExtension(ending);
    if (type == null) {
      return ContentType.OCTET_STREAM;
    }
    return type.isHumanReadable() ? type.getMimeType() + "; charset=utf-8" : type.getMimeType();
  }
}
