package beamwarden.bridge;

import java.io.PrintStream;
import java.util.List;

/**
 * A process that hosts an adapter: what {@link HostProcess} starts.
 *
 * <p>It exits with 0 at an orderly end, 2 when its command line or settings are wrong, and 3 when
 * another host works in the same folder or the outside world fails.
 */
public final class HostMain {
  private HostMain() {}

  /** Runs until a daemon says bye, no daemon comes, or the process is told to end. */
  public static void main(String[] args) {
    // Over streams, standard output carries messages: whatever else is printed must not join them.
    PrintStream messages = System.out;
    System.setOut(System.err);
    System.exit(new HostRun(System.in, messages, System.err).run(List.of(args)));
  }
}
