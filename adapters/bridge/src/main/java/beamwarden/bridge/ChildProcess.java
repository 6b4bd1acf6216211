package beamwarden.bridge;

import java.io.IOException;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.CompletableFuture;
import java.util.concurrent.TimeUnit;

/**
 * An adapter as a child of this process, spoken to over its standard input and output.
 *
 * <p>It ends with its connection: this is for an adapter whose instrument stops safely by itself,
 * and for trying one out. An adapter that goes on exposing without its daemon is a {@link
 * HostProcess}.
 */
public final class ChildProcess implements PeerStarter {
  private static final long KILL_AFTER_SECONDS = 10;

  private final List<String> command;
  private final Path log;

  /**
   * An adapter that {@code command} starts.
   *
   * @param log where its standard error goes
   */
  public ChildProcess(List<String> command, Path log) {
    this.command = List.copyOf(command);
    this.log = log;
  }

  @Override
  public Peer open() throws IOException {
    Process process =
        new ProcessBuilder(command)
            .redirectError(ProcessBuilder.Redirect.appendTo(log.toFile()))
            .start();
    return new Peer(
        "process " + process.pid(),
        process.getInputStream(),
        process.getOutputStream(),
        Optional.empty(),
        () -> end(process));
  }

  private static void end(Process process) {
    process.destroy();
    CompletableFuture.delayedExecutor(KILL_AFTER_SECONDS, TimeUnit.SECONDS)
        .execute(process::destroyForcibly);
  }
}
