package roundwright.server.demo;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.extension.RegisterExtension;
import roundwright.scheduling.file.EventFile;
import roundwright.scheduling.file.FileProblems;
import roundwright.server.Browser;
import roundwright.server.Served;

class DemoTest {
  @RegisterExtension static final Served SERVED = new Served();

  @Test
  void the_demo_ends_with_addresses_that_open_and_runs_a_second_time_on_what_is_there()
      throws IOException, InterruptedException {
    List<String> said = new ArrayList<>();
    Demo demo = new Demo(SERVED.app(), said::add);
    Demo.Addresses addresses = demo.run(1, 1);
    assertTrue(said.get(0).contains("184 people"), said.toString());
    assertTrue(said.contains("Published as edition 1."), said.toString());
    Browser browser = SERVED.browser();
    assertEquals(200, browser.get(addresses.publicPage()).statusCode());
    assertEquals(200, browser.get(addresses.board()).statusCode());
    for (String link : List.of(addresses.competitor(), addresses.crewMember())) {
      String day = browser.get(link).headers().firstValue("Location").orElseThrow();
      assertEquals(200, browser.get(day).statusCode());
    }

    said.clear();
    demo.run(1, 1);
    assertEquals(1, said.size(), said.toString());
  }

  @Test
  void the_jars_tables_are_the_event_file() throws IOException, FileProblems {
    EventFile file = EventFile.read(Path.of("../demo-event/event.json"));
    assertEquals(file, Demo.read());
    Browser organiser = SERVED.hostBrowser();
    new roundwright.server.event.EventWrites(SERVED.app().database()).importEvent("exported", file);
    assertEquals(
        Files.readString(Path.of("../demo-event/event.json"), StandardCharsets.UTF_8),
        organiser.get("/events/exported/event.json").body());
  }
}
