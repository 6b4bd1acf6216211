package beamwarden.system;

import java.nio.file.Path;
import java.util.Set;
import java.util.TreeSet;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/** What a package-info says in its Javadoc. */
record PackageInfo(String text) {
  /** From "May import" to the end of the sentence; a dot within a name ends none. */
  private static final Pattern IMPORTS = Pattern.compile("May import (.+?)\\.(?: |$)");

  private static final Pattern NAME = Pattern.compile("\\{@code ([a-z.]+)}");

  /** Reads a package-info of ours. */
  static PackageInfo of(PackageTable.Row row) {
    String folder = row.module() + "/src/main/java/beamwarden/" + row.name().replace('.', '/');
    return of(Repository.ROOT.resolve(folder).resolve("package-info.java"));
  }

  /** Reads the Javadoc of a file, on one line. */
  static PackageInfo of(Path file) {
    String source = Repository.read(file);
    int from = source.indexOf("/**");
    int to = source.indexOf("*/");
    String comment = from < 0 || to < from ? "" : source.substring(from + 3, to);
    return new PackageInfo(comment.replaceAll("\\n \\*", " ").replaceAll("\\s+", " ").strip());
  }

  /**
   * The names of our packages that it says it may import: those it lists, or with the words
   * "everything but" those it does not.
   *
   * @param all the names of all packages there are, its own left out
   * @throws IllegalArgumentException when it does not say what it may import
   */
  Set<String> imports(Set<String> all) {
    Matcher sentence = IMPORTS.matcher(text);
    if (!sentence.find()) {
      throw new IllegalArgumentException("it must have a sentence \"May import ...\": " + text);
    }
    Set<String> listed = new TreeSet<>();
    NAME.matcher(sentence.group(1)).results().forEach(name -> listed.add(name.group(1)));
    if (!sentence.group(1).startsWith("everything but ")) {
      return listed;
    }
    Set<String> rest = new TreeSet<>(all);
    rest.removeAll(listed);
    return rest;
  }
}
