package roundwright.server.web;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import org.junit.jupiter.api.Test;

class RouteTest {
  @Test
  void a_route_that_names_no_role_cannot_be_made() {
    IllegalArgumentException e =
        assertThrows(IllegalArgumentException.class, () -> Route.get("/open", ctx -> {}));
    assertEquals("Route GET /open names no role. Say who may use it.", e.getMessage());
  }
}
