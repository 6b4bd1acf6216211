package beamwarden.system;

import static java.nio.charset.StandardCharsets.UTF_8;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.stream.Stream;

/** The checkout that is tested. */
final class Repository {
  /** Its root; Maven says where, and a test started otherwise stands in this module's folder. */
  static final Path ROOT =
      Path.of(System.getProperty("beamwarden.root", "../..")).toAbsolutePath().normalize();

  private Repository() {}

  static String read(Path file) {
    try {
      return Files.readString(file);
    } catch (IOException failure) {
      throw new UncheckedIOException(failure);
    }
  }

  /**
   * What belongs to the project, as paths below the root: what git knows or would add, and without
   * git whatever is neither hidden nor built.
   */
  static List<Path> files() {
    return git("ls-files", "-z", "--cached", "--others", "--exclude-standard")
        .map(Repository::existing)
        .orElseGet(Repository::walked);
  }

  private static List<Path> existing(List<String> names) {
    return names.stream()
        .distinct()
        .map(Path::of)
        .filter(path -> Files.isRegularFile(ROOT.resolve(path)))
        .toList();
  }

  private static List<Path> walked() {
    try (Stream<Path> all = Files.walk(ROOT)) {
      return all.filter(Files::isRegularFile)
          .map(ROOT::relativize)
          .filter(path -> !path.startsWith(".git") && !isBuilt(path))
          .toList();
    } catch (IOException failure) {
      throw new UncheckedIOException(failure);
    }
  }

  private static boolean isBuilt(Path path) {
    return Stream.iterate(path, each -> each != null, Path::getParent)
        .anyMatch(each -> each.endsWith("target"));
  }

  /** What git keeps as a program, as paths below the root; empty when git is not there. */
  static Optional<List<Path>> programs() {
    return git("ls-files", "-z", "--stage")
        .map(
            lines ->
                lines.stream()
                    .filter(line -> line.startsWith("100755 "))
                    .map(line -> Path.of(line.substring(line.indexOf('\t') + 1)))
                    .toList());
  }

  /** The answer of git, cut at the zeros; empty when there is no git or this is no checkout. */
  private static Optional<List<String>> git(String... arguments) {
    List<String> command =
        Stream.concat(
                Stream.of("git", "-c", "safe.directory=*", "-C", ROOT.toString()),
                Arrays.stream(arguments))
            .toList();
    try {
      Process git =
          new ProcessBuilder(command).redirectError(ProcessBuilder.Redirect.DISCARD).start();
      String answer = new String(git.getInputStream().readAllBytes(), UTF_8);
      return git.waitFor() == 0 ? Optional.of(List.of(answer.split("\0"))) : Optional.empty();
    } catch (IOException noGit) {
      return Optional.empty();
    } catch (InterruptedException interrupted) {
      Thread.currentThread().interrupt();
      throw new IllegalStateException(interrupted);
    }
  }
}
