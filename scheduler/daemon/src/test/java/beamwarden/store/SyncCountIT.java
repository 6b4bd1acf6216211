package beamwarden.store;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.BufferedReader;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.concurrent.TimeUnit;
import java.util.stream.Stream;
import org.junit.jupiter.api.Assumptions;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.Timeout;
import org.junit.jupiter.api.extension.RegisterExtension;

/**
 * Goal: a commit is synced to the disk, and once only. Method: the system calls of a process that
 * makes no commits are counted against those of one that makes many; what they do besides is the
 * same. That the setting itself holds is checked at every opening of a store.
 */
class SyncCountIT {
  private static final Path TRACER = Path.of("/usr/bin/strace");
  private static final int COMMITS = 50;

  @RegisterExtension final StoreExtension store = new StoreExtension();

  @Test
  @Timeout(180)
  void aCommitIsOneSync() throws IOException, InterruptedException {
    Assumptions.assumeTrue(
        Files.isExecutable(TRACER),
        "syncs are not counted: strace is not installed; the pragma is checked instead");
    long without = syncs("without", 0);
    assertTrue(without > 0, "the tracer saw nothing");
    assertEquals(COMMITS, syncs("with", COMMITS) - without);
  }

  private long syncs(String name, int commits) throws IOException, InterruptedException {
    Path folder = Files.createDirectory(store.folder().resolve(name));
    Path trace = store.folder().resolve(name + ".trace");
    List<String> tracer =
        List.of(TRACER.toString(), "-f", "-e", "trace=fsync,fdatasync", "-o", trace.toString());
    Process writer = WriterProcess.start(folder, commits, tracer);
    try (BufferedReader output = writer.inputReader()) {
      int entries = 1 + commits / 2 * (1 + WriterProcess.LARGE);
      assertEquals(entries, WriterProcess.lastAcknowledged(output, 0));
    }
    assertTrue(writer.waitFor(1, TimeUnit.MINUTES));
    try (Stream<String> lines = Files.lines(trace)) {
      return lines.filter(line -> line.contains("sync(")).count();
    }
  }
}
