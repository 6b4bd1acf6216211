package beamwarden.store;

import beamwarden.ledger.Entry;
import java.io.BufferedReader;
import java.io.IOException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.stream.IntStream;

/**
 * A process that stores entries until it is killed, or as many as it was told to.
 *
 * <p>Commits of one and of several entries take turns. After each it prints a line with the number
 * of the last entry: what was acknowledged.
 */
final class WriterProcess {
  /** Every other commit has this many entries. */
  static final int LARGE = 7;

  private static final String ACKNOWLEDGED = "stored ";

  private WriterProcess() {}

  /** Arguments: the store's folder, and how many commits to make. */
  public static void main(String[] arguments) {
    int commits = Integer.parseInt(arguments[1]);
    try (SqliteJournal journal = SqliteJournal.open(Path.of(arguments[0]))) {
      long fence = journal.raiseFence("north-room", Examples.AT);
      acknowledge(1);
      for (int commit = 0; commit < commits; commit++) {
        int size = commit % 2 == 0 ? 1 : LARGE;
        var stored = journal.commit(fence, Examples.AT, entries(fence, commit, size));
        acknowledge(stored.get(size - 1).number());
      }
    }
  }

  /** Each says of which commit it is, and how many there must be. */
  private static List<Entry> entries(long fence, int commit, int size) {
    return IntStream.range(0, size)
        .mapToObj(index -> Examples.noted(fence + "/" + commit + "/" + size))
        .toList();
  }

  private static void acknowledge(long number) {
    System.out.println(ACKNOWLEDGED + number);
    System.out.flush();
  }

  /** What a process acknowledged last, once its output ends; at least {@code atLeast}. */
  static long lastAcknowledged(BufferedReader output, long atLeast) throws IOException {
    long last = atLeast;
    for (String line = output.readLine(); line != null; line = output.readLine()) {
      last = Math.max(last, acknowledged(line));
    }
    return last;
  }

  /** What a process acknowledged first. */
  static long firstAcknowledged(BufferedReader output) throws IOException {
    String line = output.readLine();
    while (line != null && acknowledged(line) == 0) {
      line = output.readLine();
    }
    return line == null ? 0 : acknowledged(line);
  }

  /** Zero for a line of the log; a line that was cut off acknowledges less, or nothing. */
  private static long acknowledged(String line) {
    String number = line.startsWith(ACKNOWLEDGED) ? line.substring(ACKNOWLEDGED.length()) : "";
    return number.isEmpty() ? 0 : Long.parseLong(number);
  }

  /** Starts one; {@code before} is put before the command, such as a tracer. */
  static Process start(Path folder, int commits, List<String> before) throws IOException {
    List<String> command = new ArrayList<>(before);
    command.add(Path.of(System.getProperty("java.home"), "bin", "java").toString());
    command.addAll(List.of("-Xshare:auto", "-XX:TieredStopAtLevel=1"));
    command.addAll(List.of("-cp", System.getProperty("java.class.path")));
    command.add(WriterProcess.class.getName());
    command.addAll(List.of(folder.toString(), Integer.toString(commits)));
    return new ProcessBuilder(command).redirectError(ProcessBuilder.Redirect.DISCARD).start();
  }
}
