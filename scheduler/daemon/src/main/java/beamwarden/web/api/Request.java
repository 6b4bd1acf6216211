package beamwarden.web.api;

import java.util.List;
import java.util.Map;
import java.util.Optional;

/**
 * A request.
 *
 * @param method its method
 * @param path its path, decoded, without its query
 * @param query its query parameters, decoded
 * @param contentType the media type of its body, lower case and without parameters; empty without
 *     one
 * @param wantsText whether it asks for plain text rather than JSON
 * @param body its body; empty without one
 */
public record Request(
    String method,
    String path,
    Map<String, String> query,
    Optional<String> contentType,
    boolean wantsText,
    Body body) {
  /** Copies the query. */
  public Request {
    query = Map.copyOf(query);
  }

  /** The path's parts between its slashes. */
  List<String> parts() {
    return Paths.parts(path);
  }
}
