package beamwarden.web.api;

import java.util.ArrayList;
import java.util.List;

/** Splits paths. */
final class Paths {
  private Paths() {}

  /** The parts between slashes; an empty last one, after a slash at the end, counts too. */
  static List<String> parts(String path) {
    List<String> parts = new ArrayList<>();
    int from = path.startsWith("/") ? 1 : 0;
    for (int slash = path.indexOf('/', from); slash >= 0; slash = path.indexOf('/', from)) {
      parts.add(path.substring(from, slash));
      from = slash + 1;
    }
    parts.add(path.substring(from));
    return parts;
  }
}
