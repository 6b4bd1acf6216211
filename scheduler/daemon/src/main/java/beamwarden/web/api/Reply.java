package beamwarden.web.api;

import beamwarden.answer.Json;
import java.util.Map;

/**
 * A reply.
 *
 * @param status its status code
 * @param contentType its media type
 * @param headers further headers
 * @param body its text
 */
public record Reply(int status, String contentType, Map<String, String> headers, String body) {
  static final String JSON = "application/json";
  static final String TEXT = "text/plain; charset=utf-8";

  /** Copies the headers. */
  public Reply {
    headers = Map.copyOf(headers);
  }

  static Reply json(Object answer) {
    return new Reply(200, JSON, Map.of(), Json.line(answer));
  }

  static Reply text(String page) {
    return new Reply(200, TEXT, Map.of(), page);
  }
}
