package beamwarden.command;

import beamwarden.answer.Json;
import java.net.URLEncoder;
import java.nio.charset.StandardCharsets;
import java.util.Map;
import java.util.concurrent.Callable;
import picocli.CommandLine.Mixin;

/** A command that speaks to a daemon. */
abstract class RemoteCommand implements Callable<Integer> {
  private final Surroundings surroundings;
  @Mixin private DaemonOptions daemon;
  @Mixin private CommonOptions common;

  RemoteCommand(Surroundings surroundings) {
    this.surroundings = surroundings;
  }

  /** Does what the command is for. */
  abstract ExitCode run(Client client);

  /** Finds the daemon, and does what the command is for. */
  ExitCode run() {
    return run(client());
  }

  @Override
  public final Integer call() {
    try {
      return run().code();
    } catch (CommandFailure failure) {
      if (json()) {
        failure.answer().ifPresent(answer -> surroundings.answer(indented(answer)));
      }
      throw failure;
    }
  }

  /** A client of the daemon as it can be found now. */
  final Client client() {
    return new Client(daemon.address(surroundings), daemon.store(surroundings));
  }

  final Surroundings surroundings() {
    return surroundings;
  }

  final DaemonOptions daemon() {
    return daemon;
  }

  final boolean json() {
    return common.json();
  }

  /** Answers with JSON as it came, or with lines for a person. */
  final void answer(String json, String page) {
    surroundings.answer(json() ? indented(json) : page);
  }

  static String indented(String json) {
    return Json.read(json, Object.class).map(Json::lines).orElse(json);
  }

  /** A name as a part of a path. */
  static String encoded(String name) {
    return URLEncoder.encode(name, StandardCharsets.UTF_8).replace("+", "%20");
  }

  static String body(Map<String, ?> fields) {
    return Json.line(fields);
  }
}
