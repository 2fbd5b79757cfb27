package roundwright.server;

import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.noClasses;
import static com.tngtech.archunit.library.dependencies.SlicesRuleDefinition.slices;

import com.tngtech.archunit.base.DescribedPredicate;
import com.tngtech.archunit.core.domain.JavaClass;
import com.tngtech.archunit.core.domain.JavaClasses;
import com.tngtech.archunit.core.importer.ClassFileImporter;
import com.tngtech.archunit.core.importer.ImportOption;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** Holds the arrows of DEVELOPERS.md. */
class ArrowsTest {
  private static final String ROOT = "roundwright.server";
  private static final List<String> FEATURES = List.of("account", "event", "planning", "editions");
  private static final JavaClasses OURS =
      new ClassFileImporter()
          .withImportOption(ImportOption.Predefined.DO_NOT_INCLUDE_TESTS)
          .importPackages(ROOT);

  private static String[] packages(List<String> names) {
    return names.stream().map(name -> ROOT + "." + name + "..").toArray(String[]::new);
  }

  @ParameterizedTest
  @ValueSource(strings = {"account", "event", "planning", "editions"})
  void features_do_not_know_each_other(String feature) {
    List<String> others = FEATURES.stream().filter(name -> !name.equals(feature)).toList();
    noClasses()
        .that()
        .resideInAPackage(ROOT + "." + feature + "..")
        .should()
        .dependOnClassesThat()
        .resideInAnyPackage(packages(others))
        .check(OURS);
  }

  @Test
  void features_know_only_web_store_ids_and_tickets_of_ours() {
    noClasses()
        .that()
        .resideInAnyPackage(packages(FEATURES))
        .should()
        .dependOnClassesThat()
        .resideInAnyPackage(ROOT, ROOT + ".demo..", ROOT + ".command..")
        .check(OURS);
  }

  @Test
  void the_web_knows_no_sql_and_no_feature() {
    noClasses()
        .that()
        .resideInAPackage(ROOT + ".web..")
        .should()
        .dependOnClassesThat(
            inPackages("org.jooq", "java.sql", "javax.sql", ROOT + ".store.schema")
                .or(inPackages(packagesOf(FEATURES)))
                .or(inPackages(ROOT + ".ticket", ROOT + ".demo", ROOT + ".command")))
        .check(OURS);
  }

  @Test
  void the_store_knows_no_http_and_no_page() {
    noClasses()
        .that()
        .resideInAPackage(ROOT + ".store..")
        .should()
        .dependOnClassesThat(inPackages("io.javalin", "org.eclipse.jetty", ROOT + ".web"))
        .check(OURS);
  }

  @Test
  void handlers_see_no_sql() {
    noClasses()
        .that()
        .haveSimpleNameEndingWith("Routes")
        .should()
        .dependOnClassesThat(inPackages("org.jooq", "java.sql", ROOT + ".store.schema"))
        .check(OURS);
  }

  @Test
  void reads_and_rows_see_no_http() {
    noClasses()
        .that()
        .haveSimpleNameEndingWith("Reads")
        .or()
        .haveSimpleNameEndingWith("Writes")
        .or()
        .haveSimpleNameEndingWith("Rows")
        .should()
        .dependOnClassesThat(inPackages("io.javalin", "org.eclipse.jetty", "jakarta.servlet"))
        .check(OURS);
  }

  @Test
  void only_html_knows_the_template_engine() {
    noClasses()
        .that()
        .haveNameNotMatching("roundwright\\.server\\.web\\.Html.*")
        .should()
        .dependOnClassesThat(inPackages("org.thymeleaf", "ognl"))
        .check(OURS);
  }

  @Test
  void only_planning_the_command_line_and_the_demo_know_the_engines_door() {
    noClasses()
        .that()
        .resideOutsideOfPackages(ROOT + ".planning..", ROOT + ".command..", ROOT + ".demo..")
        .should()
        .dependOnClassesThat()
        .resideInAPackage("roundwright.scheduling")
        .check(OURS);
  }

  @Test
  void nobody_but_the_command_line_looks_behind_the_engines_door() {
    noClasses()
        .that()
        .resideOutsideOfPackage(ROOT + ".command..")
        .should()
        .dependOnClassesThat(
            inPackages(
                "roundwright.scheduling.audit",
                "roundwright.scheduling.core",
                "roundwright.scheduling.rules",
                "roundwright.scheduling.crewing",
                "roundwright.scheduling.timetable",
                "roundwright.scheduling.flow"))
        .check(OURS);
    noClasses()
        .that()
        .resideOutsideOfPackages(ROOT + ".event..", ROOT + ".command..", ROOT + ".demo..")
        .should()
        .dependOnClassesThat(inPackages("roundwright.scheduling.file"))
        .check(OURS);
  }

  @Test
  void ids_and_settings_know_next_to_nothing() {
    noClasses()
        .that()
        .resideInAPackage(ROOT + ".ids..")
        .should()
        .dependOnClassesThat()
        .resideInAPackage(ROOT + ".web..")
        .check(OURS);
  }

  @Test
  void no_circle_runs_through_the_packages_below_the_app() {
    slices()
        .matching(ROOT + ".(web|ids|store|ticket|account|event|planning|editions|demo|command)..")
        .should()
        .beFreeOfCycles()
        .check(OURS);
  }

  private static String[] packagesOf(List<String> names) {
    return names.stream().map(name -> ROOT + "." + name).toArray(String[]::new);
  }

  private static DescribedPredicate<JavaClass> inPackages(String... names) {
    return DescribedPredicate.describe(
        "are in " + List.of(names),
        type ->
            List.of(names).stream()
                .anyMatch(
                    name ->
                        type.getPackageName().equals(name)
                            || type.getPackageName().startsWith(name + ".")));
  }
}
