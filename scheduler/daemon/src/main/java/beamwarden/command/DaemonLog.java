package beamwarden.command;

import java.nio.file.Path;

/** Where a daemon logs: into files of its store that roll, and warnings to standard error too. */
final class DaemonLog {
  private static final String CONFIGURATION = "logback.configurationFile";
  private static final String FOLDER = "beamwarden.log";

  private DaemonLog() {}

  /**
   * Lets everything from here on be logged into a store's folder; only before anything is logged at
   * all. A configuration that the caller named goes first.
   */
  static void into(Path store) {
    System.setProperty(FOLDER, store.resolve("log").toString());
    if (System.getProperty(CONFIGURATION) == null) {
      System.setProperty(CONFIGURATION, "logback-serve.xml");
    }
  }
}
