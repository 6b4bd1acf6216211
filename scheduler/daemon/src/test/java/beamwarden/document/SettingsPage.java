package beamwarden.document;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Locale;
import java.util.Map;
import java.util.TreeMap;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/**
 * The settings reference as it is written: under each heading of the third level entries, each a
 * line of keys in bold and a text.
 *
 * @param text the whole page
 * @param sections the text of each entry, by its section's title in lower case and by its key
 */
public record SettingsPage(String text, Map<String, Map<String, String>> sections) {
  private static final Path FILE =
      Path.of(System.getProperty("beamwarden.root", "../..")).resolve("ops/settings.md");
  private static final Pattern KEY = Pattern.compile("\\*\\*`([a-z-]+)`\\*\\*");

  /** Reads it as it lies in the checkout. */
  public static SettingsPage read() {
    try {
      return of(Files.readString(FILE));
    } catch (IOException missing) {
      throw new IllegalStateException(FILE + " cannot be read", missing);
    }
  }

  private static SettingsPage of(String text) {
    Map<String, Map<String, String>> sections = new TreeMap<>();
    for (String section : text.split("(?m)^### ", -1)) {
      String title = section.lines().findFirst().orElse("");
      String own = section.split("(?m)^## ", -1)[0];
      sections.put(title.toLowerCase(Locale.ROOT), entries(own));
    }
    return new SettingsPage(text, sections);
  }

  private static Map<String, String> entries(String section) {
    Map<String, String> entries = new TreeMap<>();
    for (String block : section.split("\n\n", -1)) {
      String[] keysAndText = block.strip().split("\n", 2);
      Matcher keys = KEY.matcher(keysAndText[0]);
      while (keys.find()) {
        entries.put(keys.group(1), keysAndText.length > 1 ? oneLine(keysAndText[1]) : "");
      }
    }
    return entries;
  }

  private static String oneLine(String text) {
    return text.replace('\n', ' ');
  }
}
