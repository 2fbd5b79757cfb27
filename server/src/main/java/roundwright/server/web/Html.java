package roundwright.server.web;

import io.javalin.http.Context;
import io.javalin.http.HttpStatus;
import java.nio.file.Path;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import ognl.OgnlContext;
import ognl.OgnlException;
import ognl.OgnlRuntime;
import ognl.PropertyAccessor;
import org.thymeleaf.TemplateEngine;
import org.thymeleaf.context.IExpressionContext;
import org.thymeleaf.context.ITemplateContext;
import org.thymeleaf.linkbuilder.StandardLinkBuilder;
import org.thymeleaf.messageresolver.AbstractMessageResolver;
import org.thymeleaf.templatemode.TemplateMode;
import org.thymeleaf.templateresolver.AbstractConfigurableTemplateResolver;
import org.thymeleaf.templateresolver.ClassLoaderTemplateResolver;
import org.thymeleaf.templateresolver.FileTemplateResolver;

/**
 * Turns views into HTML; the only place that knows the template engine and htmx's request headers.
 * Templates see the view's model and, beside it, {@code wording}, {@code assets}, {@code visitor}
 * and {@code formToken}.
 */
public final class Html {
  private static final Locale LANGUAGE = Locale.ENGLISH;

  private final TemplateEngine engine = new TemplateEngine();
  private final Messages messages;
  private final Assets assets;
  private final Guard guard;

  static {
    // Templates say ${ticket.name} of records as of everything else.
    OgnlRuntime.setPropertyAccessor(Record.class, new RecordComponents());
  }

  public Html(Messages messages, Assets assets, Guard guard, Optional<Path> devRoot) {
    this.messages = messages;
    this.assets = assets;
    this.guard = guard;
    AbstractConfigurableTemplateResolver resolver;
    if (devRoot.isPresent()) {
      resolver = new FileTemplateResolver();
      resolver.setPrefix(devRoot.get().resolve("templates") + "/");
      resolver.setCacheable(false);
    } else {
      resolver = new ClassLoaderTemplateResolver(Html.class.getClassLoader());
      resolver.setPrefix("templates/");
    }
    resolver.setSuffix(".html");
    resolver.setTemplateMode(TemplateMode.HTML);
    resolver.setCharacterEncoding("UTF-8");
    engine.setTemplateResolver(resolver);
    engine.setMessageResolver(new Sentences(messages));
    engine.setLinkBuilder(new FromTheRoot());
  }

  /** True where htmx asks for a part of a page, not for a page. */
  public static boolean wantsFragment(Context ctx) {
    return "true".equals(ctx.header("HX-Request"))
        && !"true".equals(ctx.header("HX-Boosted"))
        && !"true".equals(ctx.header("HX-History-Restore-Request"));
  }

  /** Sends the browser on after a change: 303 for a form, htmx's own header for htmx. */
  public static void leaveFor(Context ctx, String path) {
    if (wantsFragment(ctx)) {
      ctx.status(HttpStatus.OK).header("HX-Redirect", path);
    } else {
      ctx.redirect(path, HttpStatus.SEE_OTHER);
    }
  }

  /** Answers with the whole page, or with the view's fragment where htmx asks for one. */
  public void show(Context ctx, View view) {
    ctx.header("Vary", "HX-Request");
    ctx.contentType("text/html; charset=utf-8");
    ctx.result(render(ctx, view, wantsFragment(ctx) ? view.fragment() : Optional.empty()));
    if (ctx.res().getHeader("Cache-Control") == null) {
      ctx.header("Cache-Control", "no-cache");
    }
  }

  /** The same with a status other than 200. */
  public void show(Context ctx, HttpStatus status, View view) {
    show(ctx, view);
    ctx.status(status);
  }

  private String render(Context ctx, View view, Optional<String> fragment) {
    org.thymeleaf.context.Context known = new org.thymeleaf.context.Context(LANGUAGE);
    known.setVariable("wording", new Wording(messages, LANGUAGE));
    known.setVariable("assets", assets);
    known.setVariable("visitor", Access.visitor(ctx));
    known.setVariable("path", ctx.path());
    known.setVariable("formToken", new FormToken(guard, ctx));
    view.model().forEach(known::setVariable);
    return fragment
        .map(name -> engine.process(view.template(), Set.of(name), known))
        .orElseGet(() -> engine.process(view.template(), known));
  }

  /** Drawn when a form first asks for it, so that pages without forms set no cookie. */
  private record FormToken(Guard guard, Context ctx) {
    @Override
    public String toString() {
      return guard.formToken(ctx);
    }
  }

  /** Links begin at the root: the server has no path of its own before them. */
  private static final class FromTheRoot extends StandardLinkBuilder {
    @Override
    protected String computeContextPath(
        IExpressionContext context, String base, Map<String, Object> parameters) {
      return "";
    }
  }

  /** Looks sentences up in the bundles instead of beside the templates. */
  private static final class Sentences extends AbstractMessageResolver {
    private final Messages messages;

    Sentences(Messages messages) {
      this.messages = messages;
    }

    @Override
    public String resolveMessage(
        ITemplateContext context, Class<?> origin, String key, Object[] filled) {
      return messages.say(context.getLocale(), key, filled == null ? new Object[0] : filled);
    }

    @Override
    public String createAbsentMessageRepresentation(
        ITemplateContext context, Class<?> origin, String key, Object[] filled) {
      throw new IllegalArgumentException("No sentence for '" + key + "'");
    }
  }

  /** Reads a record's component by its name. */
  private static final class RecordComponents implements PropertyAccessor {
    @Override
    public Object getProperty(OgnlContext context, Object target, Object name)
        throws OgnlException {
      try {
        return target.getClass().getMethod(name.toString()).invoke(target);
      } catch (ReflectiveOperationException e) {
        throw new OgnlException(
            "A " + target.getClass().getSimpleName() + " has no '" + name + "'", e);
      }
    }

    @Override
    public void setProperty(OgnlContext context, Object target, Object name, Object content)
        throws OgnlException {
      throw new OgnlException("Templates change nothing");
    }

    @Override
    public String getSourceAccessor(OgnlContext context, Object target, Object index) {
      throw new UnsupportedOperationException("Expressions are not compiled");
    }

    @Override
    public String getSourceSetter(OgnlContext context, Object target, Object index) {
      throw new UnsupportedOperationException("Expressions are not compiled");
    }
  }
}
