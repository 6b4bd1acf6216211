package beamwarden.answer;

import java.util.Optional;
import tools.jackson.core.JacksonException;
import tools.jackson.databind.DeserializationFeature;
import tools.jackson.databind.SerializationFeature;
import tools.jackson.databind.json.JsonMapper;

/** Writes answers as JSON, and reads them again. Safe for use by several threads. */
public final class Json {
  private static final JsonMapper COMPACT =
      JsonMapper.builder()
          .disable(DeserializationFeature.FAIL_ON_UNKNOWN_PROPERTIES)
          .enable(DeserializationFeature.FAIL_ON_TRAILING_TOKENS)
          .build();

  private static final JsonMapper INDENTED =
      COMPACT.rebuild().enable(SerializationFeature.INDENT_OUTPUT).build();

  private Json() {}

  /** One line of JSON, for programs. */
  public static String line(Object answer) {
    return COMPACT.writeValueAsString(answer);
  }

  /** The same over several lines, its last one ended, for a terminal or a file. */
  public static String lines(Object answer) {
    return INDENTED.writeValueAsString(answer) + "\n";
  }

  /**
   * Reads an answer; empty when the text is not one. Keys that it does not know are passed over.
   */
  public static <T> Optional<T> read(String text, Class<T> type) {
    try {
      return Optional.ofNullable(COMPACT.readValue(text, type));
    } catch (JacksonException notOne) {
      return Optional.empty();
    }
  }
}
