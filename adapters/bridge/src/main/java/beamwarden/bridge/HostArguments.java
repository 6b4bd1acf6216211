package beamwarden.bridge;

import java.nio.file.InvalidPathException;
import java.nio.file.Path;
import java.time.DateTimeException;
import java.time.Duration;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;

/**
 * The command line of a host.
 *
 * @param adapter the adapter's name
 * @param folder the adapter's own folder
 * @param settings the file with its {@link HostSettings}
 * @param idle how long, in real time, it stays without a daemon
 * @param tcp whether it listens on a port, else it uses its standard streams
 */
record HostArguments(String adapter, Path folder, Path settings, Duration idle, boolean tcp) {
  /** How long a host stays without a daemon when nothing is said. */
  static final Duration USUAL_IDLE = Duration.ofMinutes(10);

  static final String USAGE =
      "usage: --adapter NAME --folder DIR --settings FILE" + " [--idle DURATION] --tcp | --streams";

  private static final Set<String> WITH_VALUE =
      Set.of("--adapter", "--folder", "--settings", "--idle");
  private static final Set<String> ALONE = Set.of("--tcp", "--streams");

  /** The command line that {@link #parse} reads back. */
  List<String> toList() {
    return new ArrayList<>(
        List.of(
            "--adapter",
            adapter,
            "--folder",
            folder.toString(),
            "--settings",
            settings.toString(),
            "--idle",
            idle.toString(),
            tcp ? "--tcp" : "--streams"));
  }

  /**
   * Reads a command line.
   *
   * @throws IllegalArgumentException with one sentence when it is not as {@link #USAGE} says
   */
  static HostArguments parse(List<String> words) {
    Map<String, String> given = given(words);
    if (given.containsKey("--tcp") == given.containsKey("--streams")) {
      throw new IllegalArgumentException("say either --tcp or --streams");
    }
    try {
      return new HostArguments(
          needed(given, "--adapter"),
          Path.of(needed(given, "--folder")),
          Path.of(needed(given, "--settings")),
          given.containsKey("--idle") ? Duration.parse(given.get("--idle")) : USUAL_IDLE,
          given.containsKey("--tcp"));
    } catch (DateTimeException | InvalidPathException e) {
      throw new IllegalArgumentException(e.getMessage(), e);
    }
  }

  private static Map<String, String> given(List<String> words) {
    Map<String, String> given = new HashMap<>();
    for (int i = 0; i < words.size(); i++) {
      String word = words.get(i);
      if (ALONE.contains(word)) {
        given.put(word, "");
      } else if (WITH_VALUE.contains(word) && i + 1 < words.size()) {
        given.put(word, words.get(++i));
      } else {
        throw new IllegalArgumentException("'" + word + "' is unknown or lacks its value");
      }
    }
    return given;
  }

  private static String needed(Map<String, String> given, String name) {
    if (!given.containsKey(name)) {
      throw new IllegalArgumentException(name + " is missing");
    }
    return given.get(name);
  }
}
