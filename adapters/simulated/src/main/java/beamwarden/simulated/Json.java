package beamwarden.simulated;

/** The little of JSON that is written here by hand, so that this adapter needs no library. */
final class Json {
  private static final char FIRST_PRINTABLE = ' ';

  private Json() {}

  /** A string in quotes. */
  static String text(String value) {
    StringBuilder quoted = new StringBuilder("\"");
    for (int at = 0; at < value.length(); at++) {
      char letter = value.charAt(at);
      if (letter == '"' || letter == '\\') {
        quoted.append('\\').append(letter);
      } else if (letter < FIRST_PRINTABLE) {
        quoted.append("\\u%04x".formatted((int) letter));
      } else {
        quoted.append(letter);
      }
    }
    return quoted.append('"').toString();
  }
}
