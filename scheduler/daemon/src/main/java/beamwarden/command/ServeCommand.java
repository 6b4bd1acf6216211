package beamwarden.command;

import beamwarden.answer.Json;
import beamwarden.document.Reading;
import beamwarden.profile.Profile;
import java.nio.file.Path;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalLong;
import java.util.concurrent.Callable;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Option;

/** Runs the daemon. */
@Command(
    name = "serve",
    description = {
      "Run the daemon that drives one instrument, until it is ended by a signal.",
      "Its address goes to standard output and into the file DIR/address."
    })
final class ServeCommand implements Callable<Integer> {
  private static final String CAUTIONS =
      """
      Beamwarden is no safety system. It never overrides an interlock; hardware limits
      and the site's radiation, high-voltage, vacuum, cryogen and laser rules come
      first. Unattended operation needs the licence holder's permission.
      """;

  private static final int PORT_MAX = 65_535;

  private final Surroundings surroundings;

  @Option(
      names = "--instrument",
      paramLabel = "PROFILE",
      required = true,
      description = "The instrument profile's document.")
  private Path profile;

  @Option(
      names = "--store",
      paramLabel = "DIR",
      required = true,
      description = "The store's folder; made when it is missing.")
  private Path store;

  @Option(
      names = "--port",
      paramLabel = "N",
      defaultValue = "0",
      description = "The port on loopback; 0 for any that is free (${DEFAULT-VALUE}).")
  private int port;

  @Option(
      names = "--pace",
      paramLabel = "FACTOR",
      description = "Run a new store this many times faster than real time.")
  private Double pace;

  @Option(
      names = "--from",
      paramLabel = "TIME",
      description = "When a new store's time begins; now without it. Lab time.")
  private String from;

  @Option(names = "--seed", paramLabel = "N", description = "The seed of a simulated instrument.")
  private Long seed;

  @Mixin private CommonOptions common;

  ServeCommand(Surroundings surroundings) {
    this.surroundings = surroundings;
  }

  @Override
  public Integer call() throws InterruptedException {
    check();
    Reading<Profile> known = Inputs.profile(profile);
    known.problems().forEach(problem -> surroundings.say(problem.text()));
    if (known.value().isEmpty()) {
      return ExitCode.NO.code();
    }
    DaemonLog.into(store);
    return serve(asked(known.value().get())).code();
  }

  private void check() {
    if (pace != null && !(pace > 0 && Double.isFinite(pace))) {
      throw new CommandFailure(ExitCode.USAGE, "--pace must be above zero, not " + pace);
    }
    if (port < 0 || port > PORT_MAX) {
      throw new CommandFailure(ExitCode.USAGE, "--port is from 0 to 65535, not " + port);
    }
  }

  private Workshop.ServeAsked asked(Profile known) {
    return new Workshop.ServeAsked(
        known,
        Inputs.text(profile),
        store,
        port,
        pace == null ? OptionalDouble.empty() : OptionalDouble.of(pace),
        Optional.ofNullable(from).map(text -> Moments.read(text, known.zone())),
        seed == null ? OptionalLong.empty() : OptionalLong.of(seed));
  }

  /** Runs until a signal comes; only a run that stops for good by itself gets to the end. */
  private ExitCode serve(Workshop.ServeAsked asked) throws InterruptedException {
    Workshop.Serving serving = surroundings.workshop().get().serve(asked);
    Thread closing = new Thread(serving::close, "closing");
    Runtime.getRuntime().addShutdownHook(closing);
    announce(serving);
    String halted = serving.awaitHalt();
    surroundings.say("beamwarden: everything has stopped: " + halted);
    return ExitCode.OUTSIDE;
  }

  private void announce(Workshop.Serving serving) {
    surroundings.answer(
        common.json()
            ? Json.line(Map.of("address", serving.address().toString())) + "\n"
            : CAUTIONS + "\n" + serving.address() + "\n");
  }
}
