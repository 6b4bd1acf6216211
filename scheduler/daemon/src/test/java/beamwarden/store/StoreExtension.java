package beamwarden.store;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.file.FileVisitOption;
import java.nio.file.Files;
import java.nio.file.Path;
import java.sql.Connection;
import java.sql.DriverManager;
import java.sql.SQLException;
import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.stream.Stream;
import org.junit.jupiter.api.Assertions;
import org.junit.jupiter.api.extension.AfterEachCallback;
import org.junit.jupiter.api.extension.BeforeEachCallback;
import org.junit.jupiter.api.extension.ExtensionContext;

/**
 * Gives each test a folder for a real store, and fails the test when a file in it is still open at
 * its end: a connection, a lock or a reader that nobody closed.
 */
final class StoreExtension implements BeforeEachCallback, AfterEachCallback {
  private static final Path OPEN_FILES = Path.of("/proc/self/fd");

  private final List<SqliteJournal> opened = new ArrayList<>();
  private Path folder;

  @Override
  public void beforeEach(ExtensionContext context) throws IOException {
    folder = Files.createTempDirectory("beamwarden-store").toRealPath();
  }

  /** The store's folder; empty at first. */
  Path folder() {
    return folder;
  }

  /** Opens the store for writing; the extension closes it. */
  SqliteJournal open() {
    return remembered(SqliteJournal.open(folder));
  }

  /** Opens the store for reading; the extension closes it. */
  SqliteJournal readOnly() {
    return remembered(SqliteJournal.readOnly(folder));
  }

  private SqliteJournal remembered(SqliteJournal journal) {
    opened.add(journal);
    return journal;
  }

  /** A connection past all rules of the store, which the test closes. */
  Connection raw() throws SQLException {
    return DriverManager.getConnection("jdbc:sqlite:" + folder.resolve("books.sqlite"));
  }

  /** Runs statements on a {@linkplain #raw raw connection}. */
  void tamper(String... statements) throws SQLException {
    try (Connection connection = raw();
        var statement = connection.createStatement()) {
      for (String sql : statements) {
        statement.executeUpdate(sql);
      }
    }
  }

  @Override
  public void afterEach(ExtensionContext context) throws IOException {
    Collections.reverse(opened);
    opened.forEach(SqliteJournal::close);
    opened.clear();
    List<Path> leaked = openFiles();
    deleteFolder();
    Assertions.assertEquals(List.of(), leaked, "files that the test left open");
  }

  private List<Path> openFiles() throws IOException {
    if (!Files.isDirectory(OPEN_FILES)) {
      return List.of();
    }
    try (Stream<Path> descriptors = Files.list(OPEN_FILES)) {
      return descriptors.flatMap(StoreExtension::target).filter(this::isInFolder).toList();
    }
  }

  private static Stream<Path> target(Path descriptor) {
    try {
      return Stream.of(Files.readSymbolicLink(descriptor));
    } catch (IOException closedMeanwhile) {
      return Stream.of();
    }
  }

  private boolean isInFolder(Path file) {
    return file.startsWith(folder);
  }

  private void deleteFolder() throws IOException {
    try (Stream<Path> files = Files.walk(folder, new FileVisitOption[0])) {
      files.sorted(Collections.reverseOrder()).forEach(StoreExtension::delete);
    }
  }

  private static void delete(Path file) {
    try {
      Files.delete(file);
    } catch (IOException e) {
      throw new UncheckedIOException(e);
    }
  }
}
