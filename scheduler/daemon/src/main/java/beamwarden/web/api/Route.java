package beamwarden.web.api;

import java.util.List;
import java.util.Optional;

/**
 * A path of the interface and what answers there.
 *
 * @param method the method
 * @param template the path; a part that is {@code *} stands for any one name
 * @param resource what answers
 */
record Route(String method, String template, Resource resource) {
  /** Answers requests of one route. */
  @FunctionalInterface
  interface Resource {
    /**
     * Answers.
     *
     * @param request the request
     * @param name what stands in the path for the template's {@code *}; empty without one
     */
    Reply answer(Request request, String name);
  }

  /** The name in a path that this route answers; empty when it does not answer that path. */
  Optional<String> nameIn(List<String> path) {
    List<String> parts = Paths.parts(template);
    if (parts.size() != path.size()) {
      return Optional.empty();
    }
    String name = "";
    for (int i = 0; i < parts.size(); i++) {
      if (parts.get(i).equals("*") && !path.get(i).isEmpty()) {
        name = path.get(i);
      } else if (!parts.get(i).equals(path.get(i))) {
        return Optional.empty();
      }
    }
    return Optional.of(name);
  }
}
