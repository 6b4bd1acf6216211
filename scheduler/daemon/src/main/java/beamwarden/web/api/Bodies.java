package beamwarden.web.api;

import beamwarden.answer.Json;
import java.util.Set;

/** Reads the bodies of requests. */
final class Bodies {
  static final String JSON = "application/json";

  private Bodies() {}

  /** The text of a body whose media type is one of some. */
  static String text(Request request, Set<String> types) {
    String type = request.contentType().orElse("nothing");
    if (!types.contains(type)) {
      throw Refusal.of(
          RefusalKind.MEDIA_TYPE,
          "the body is said to be " + type + "; send " + String.join(" or ", types));
    }
    return request
        .body()
        .text()
        .orElseThrow(() -> Refusal.of(RefusalKind.MALFORMED, "the body is not in UTF-8"));
  }

  /** A JSON body. */
  static <T> T json(Request request, Class<T> type, String example) {
    return Json.read(text(request, Set.of(JSON)), type)
        .orElseThrow(
            () -> Refusal.of(RefusalKind.MALFORMED, "the body cannot be read; write " + example));
  }
}
