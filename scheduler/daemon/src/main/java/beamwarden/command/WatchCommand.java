package beamwarden.command;

import beamwarden.answer.EntryAnswer;
import beamwarden.answer.JobsAnswer;
import beamwarden.answer.NowAnswer;
import beamwarden.answer.ProgressAnswer;
import java.io.IOException;
import java.io.InputStream;
import java.util.Optional;
import java.util.concurrent.TimeUnit;
import picocli.CommandLine.Command;
import picocli.CommandLine.Option;

/** Shows how the night goes on. */
@Command(
    name = "watch",
    description = {
      "Show how the night goes on, until no job is left that could run by itself.",
      "On a terminal a bar for each job, else a line for each change."
    })
final class WatchCommand extends RemoteCommand {
  private static final long RETRY_MILLIS = 500;
  private static final int MILLIS = 1000;

  @Option(
      names = "--until-done",
      description = "Wait for jobs when there are none, and exit with 1 unless all get done.")
  private boolean untilDone;

  @Option(names = "--plain", description = "Lines, on a terminal too.")
  private boolean plain;

  @Option(
      names = "--patience",
      paramLabel = "SECONDS",
      defaultValue = "60",
      description = "How long the daemon may be out of reach (${DEFAULT-VALUE}).")
  private int patience;

  private Board board;
  private Showing showing;

  WatchCommand(Surroundings surroundings) {
    super(surroundings);
  }

  @Override
  ExitCode run(Client first) {
    showing = showing();
    begin(first);
    follow(first);
    if (!json()) {
      surroundings().answer(board.summary() + "\n");
    }
    return untilDone && !board.allDone() ? ExitCode.NO : ExitCode.FINE;
  }

  private Showing showing() {
    if (json()) {
      return new JsonLines(surroundings());
    }
    return surroundings().terminal() && !plain
        ? new Bars(surroundings())
        : new Lines(surroundings());
  }

  private void begin(Client client) {
    NowAnswer now = client.get("/api/v1/night", NowAnswer.class);
    board = new Board(now, client.get("/api/v1/jobs", JobsAnswer.class));
    showing.begin(board);
  }

  private boolean over() {
    boolean empty = board.jobs().isEmpty();
    return empty ? !untilDone : !board.somethingMayRun();
  }

  /** Follows the events; comes back to a daemon that is started again, wherever it then is. */
  private void follow(Client first) {
    long tries = Math.max(1, patience * (long) MILLIS / RETRY_MILLIS);
    Optional<Client> client = Optional.of(first);
    long failed = 0;
    while (!over()) {
      boolean heard = client.isPresent() && listen(client.get());
      failed = heard ? 0 : failed + 1;
      if (!over()) {
        if (failed > tries) {
          throw new CommandFailure(
              ExitCode.OUTSIDE,
              "the daemon was out of reach for " + patience + " s; watch again once it runs");
        }
        pause();
        client = found();
      }
    }
  }

  private Optional<Client> found() {
    try {
      return Optional.of(client());
    } catch (CommandFailure gone) {
      return Optional.empty();
    }
  }

  /** Listens until the stream ends or all is over; whether the daemon answered at all. */
  private boolean listen(Client client) {
    try {
      Optional<InputStream> stream = client.events(board.entry());
      if (stream.isEmpty()) {
        begin(client);
        return true;
      }
      try (Events events = new Events(stream.get())) {
        Optional<Events.Event> event = events.next();
        while (event.isPresent() && take(client, event.get())) {
          event = events.next();
        }
      }
      return true;
    } catch (IOException gone) {
      return false;
    }
  }

  /** Takes one event in; false when all is over. */
  private boolean take(Client client, Events.Event event) {
    if (event.kind().equals("entry")) {
      EntryAnswer told = client.read(event.data(), EntryAnswer.class);
      board.take(told);
      showing.entry(board, told);
      return !over();
    }
    ProgressAnswer job = client.read(event.data(), ProgressAnswer.class);
    board.take(job);
    showing.progress(board, job.id(), event.data());
    return !over();
  }

  private static void pause() {
    try {
      TimeUnit.MILLISECONDS.sleep(RETRY_MILLIS);
    } catch (InterruptedException interrupted) {
      Thread.currentThread().interrupt();
      throw new CommandFailure(ExitCode.OUTSIDE, "the command was interrupted", interrupted);
    }
  }
}
