package beamwarden.system;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.regex.MatchResult;
import java.util.regex.Pattern;
import java.util.stream.Stream;

/**
 * A Markdown file of the repository.
 *
 * @param file where it lies
 * @param text what it says
 */
record Markdown(Path file, String text) {
  private static final Pattern FENCED = Pattern.compile("(?ms)^```([a-z]*)\n(.*?)^```$");
  private static final Pattern LINK = Pattern.compile("\\[[^\\]]+\\]\\(([^)\\s]+)\\)");
  private static final Pattern HEADING = Pattern.compile("(?m)^#+ (.+)$");

  /**
   * A fenced block.
   *
   * @param language what is written behind the fence; empty for commands and output
   * @param text what is in it
   */
  record Block(String language, String text) {}

  static Markdown of(String path) {
    Path file = Repository.ROOT.resolve(path);
    return new Markdown(file, Repository.read(file));
  }

  /** Every Markdown file of the checkout, built things left out. */
  static List<Markdown> all() {
    try (Stream<Path> files = Files.walk(Repository.ROOT)) {
      return files
          .filter(file -> file.toString().endsWith(".md"))
          .filter(
              file -> !Repository.ROOT.relativize(file).toString().matches(".*(target/|\\.git/).*"))
          .sorted()
          .map(file -> new Markdown(file, Repository.read(file)))
          .toList();
    } catch (IOException failure) {
      throw new UncheckedIOException(failure);
    }
  }

  List<Block> blocks() {
    return FENCED
        .matcher(text)
        .results()
        .map(block -> new Block(block.group(1), block.group(2)))
        .toList();
  }

  /** The lines of all blocks without a language that begin with a word. */
  List<String> commands(String word) {
    return blocks().stream()
        .filter(block -> block.language().isEmpty())
        .flatMap(block -> block.text().lines())
        .filter(line -> line.equals(word) || line.startsWith(word + " "))
        .toList();
  }

  /** The targets of all links that lead to no other site. */
  List<String> links() {
    return LINK.matcher(prose())
        .results()
        .map(link -> link.group(1))
        .filter(target -> !target.contains("://"))
        .toList();
  }

  /** The names under which its headings can be linked to. */
  List<String> anchors() {
    return HEADING.matcher(prose()).results().map(Markdown::anchor).toList();
  }

  private String prose() {
    return FENCED.matcher(text).replaceAll("");
  }

  private static String anchor(MatchResult heading) {
    return heading
        .group(1)
        .toLowerCase(Locale.ROOT)
        .replaceAll("[^a-z0-9 -]", "")
        .replace(' ', '-');
  }

  /** Where a link of this file leads. */
  Path target(String link) {
    String path = link.replaceAll("#.*", "");
    return path.isEmpty() ? file : file.resolveSibling(path).normalize();
  }

  /** The links that lead nowhere. */
  List<String> broken() {
    List<String> broken = new ArrayList<>();
    for (String link : links()) {
      Path target = target(link);
      if (!Files.exists(target)) {
        broken.add(link);
      } else if (link.contains("#") && target.toString().endsWith(".md")) {
        String anchor = link.substring(link.indexOf('#') + 1);
        if (!new Markdown(target, Repository.read(target)).anchors().contains(anchor)) {
          broken.add(link);
        }
      }
    }
    return broken;
  }
}
