package beamwarden.command;

import beamwarden.answer.Json;
import beamwarden.answer.NightAnswer;
import beamwarden.ledger.Books;
import beamwarden.ledger.Recorded;
import beamwarden.profile.Profile;
import beamwarden.queue.Queue;
import beamwarden.report.Night;
import beamwarden.report.NightReport;
import beamwarden.report.NightReports;
import beamwarden.report.Pages;
import beamwarden.shift.ShiftCalendar;
import java.nio.file.Path;
import java.time.Instant;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.Callable;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;

/** Runs a queue in virtual time. */
@Command(
    name = "rehearse",
    description = {
      "Run the whole queue in virtual time on the simulated instrument, and report.",
      "Exits with 1 when a job is not done. Nothing is stored."
    })
final class RehearseCommand implements Callable<Integer> {
  private final Surroundings surroundings;

  @Parameters(paramLabel = "QUEUE", description = "The queue's document, YAML or JSON.")
  private Path queue;

  @Option(
      names = "--instrument",
      paramLabel = "PROFILE",
      required = true,
      description = "The instrument profile's document.")
  private Path profile;

  @Option(names = "--store", paramLabel = "DIR", description = "Begin with what this store knows.")
  private Path store;

  @Option(
      names = "--from",
      paramLabel = "TIME",
      description = "When it begins; now without it. Without an offset: lab time.")
  private String from;

  @Option(
      names = "--seed",
      paramLabel = "N",
      defaultValue = "1",
      description = "The seed of the simulated instrument (${DEFAULT-VALUE}).")
  private long seed;

  @Option(
      names = "--noise",
      paramLabel = "on|off",
      defaultValue = "on",
      description = "Whether there is any chance at all (${DEFAULT-VALUE}).")
  private Noise noise;

  @Mixin private CommonOptions common;

  /** Whether there is any chance at all. */
  enum Noise {
    on,
    off
  }

  RehearseCommand(Surroundings surroundings) {
    this.surroundings = surroundings;
  }

  @Override
  public Integer call() {
    Inputs.Both read = Inputs.read(queue, profile);
    read.problems().forEach(problem -> surroundings.say(problem.text()));
    if (!read.usable()) {
      return ExitCode.NO.code();
    }
    return rehearse(read.queue().orElseThrow(), read.profile().orElseThrow()).code();
  }

  private ExitCode rehearse(Queue wanted, Profile known) {
    Workshop workshop = surroundings.workshop().get();
    Optional<Path> folder = Optional.ofNullable(store);
    Instant start = from == null ? workshop.now(folder) : Moments.read(from, known.zone());
    List<Recorded> before = folder.map(path -> workshop.shelf(path).entries()).orElse(List.of());
    Workshop.Rehearsed rehearsed =
        workshop.rehearse(
            new Workshop.RehearsalAsked(wanted, known, before, start, seed, noise == Noise.on));
    if (rehearsed.refusal().isPresent()) {
      throw new CommandFailure(ExitCode.NO, rehearsed.refusal().get());
    }
    NightReport report = report(known, start, rehearsed);
    surroundings.answer(common.json() ? Json.lines(NightAnswer.of(report)) : Pages.night(report));
    return done(wanted, rehearsed) ? ExitCode.FINE : ExitCode.NO;
  }

  private static NightReport report(Profile known, Instant start, Workshop.Rehearsed rehearsed) {
    ShiftCalendar calendar = new ShiftCalendar(known.zone(), known.shifts(), known.windDown());
    Night night =
        Night.spanning(start, rehearsed.ended(), calendar, known.zone())
            .or(() -> Night.at(start, calendar, known.zone()))
            .orElseThrow(
                () ->
                    new CommandFailure(
                        ExitCode.NO, "the profile has no shift, so there is no night to rehearse"));
    return new NightReports(known.abilities().instrument(), known.zone())
        .of(night, rehearsed.entries(), Optional.empty(), rehearsed.ended());
  }

  private static boolean done(Queue wanted, Workshop.Rehearsed rehearsed) {
    Books books = Books.of(rehearsed.entries());
    return wanted.jobs().stream()
        .allMatch(job -> books.job(job.id()).orElseThrow().state().satisfies());
  }
}
