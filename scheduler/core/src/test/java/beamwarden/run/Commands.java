package beamwarden.run;

import static org.junit.jupiter.api.Assertions.assertEquals;

import beamwarden.ledger.Entry;
import java.util.List;

/** Looks through what a step wants done. */
final class Commands {
  private Commands() {}

  static <T extends Command> List<T> of(Class<T> kind, List<Command> commands) {
    return commands.stream().filter(kind::isInstance).map(kind::cast).toList();
  }

  static <T extends Command> T only(Class<T> kind, List<Command> commands) {
    List<T> found = of(kind, commands);
    assertEquals(1, found.size(), () -> kind.getSimpleName() + " in " + commands);
    return found.get(0);
  }

  /** The kinds of commands, in order. */
  static List<String> kinds(List<Command> commands) {
    return commands.stream().map(command -> command.getClass().getSimpleName()).toList();
  }

  /** The kinds of entries that commands store, in order. */
  static List<String> stored(List<Command> commands) {
    return of(Command.Commit.class, commands).stream()
        .flatMap(commit -> commit.entries().stream())
        .map(Entry::getClass)
        .map(Class::getSimpleName)
        .toList();
  }
}
