package roundwright.server.web;

import io.javalin.http.Handler;
import io.javalin.http.HandlerType;
import java.util.Set;

/** One line of the route table. Without a role it cannot be made: nothing is open by forgetting. */
public record Route(HandlerType method, String path, Set<Access.Role> roles, Handler handler) {
  public Route {
    if (roles.isEmpty()) {
      throw new IllegalArgumentException(
          "Route " + method + " " + path + " names no role. Say who may use it.");
    }
    roles = Set.copyOf(roles);
  }

  public static Route get(String path, Handler handler, Access.Role... roles) {
    return new Route(HandlerType.GET, path, Set.of(roles), handler);
  }

  public static Route post(String path, Handler handler, Access.Role... roles) {
    return new Route(HandlerType.POST, path, Set.of(roles), handler);
  }
}
