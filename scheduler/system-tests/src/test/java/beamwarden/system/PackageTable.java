package beamwarden.system;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.TreeSet;

/** Which package lives in which module, and what each may import, read from a drawn table. */
final class PackageTable {
  /** What a library's name in the table stands for, as patterns of packages. */
  private static final Map<String, List<String>> LIBRARIES =
      Map.of(
          "commons-text", List.of("org.apache.commons.text.."),
          "jackson", List.of("tools.jackson..", "com.fasterxml.jackson.."),
          "jdbc", List.of("java.sql..", "javax.sql..", "org.sqlite.."),
          "junit", List.of("org.junit..", "org.opentest4j.."),
          "picocli", List.of("picocli.."),
          "quartz", List.of("org.quartz.."),
          "slf4j", List.of("org.slf4j.."),
          "snakeyaml", List.of("org.snakeyaml.."),
          "undertow", List.of("io.undertow..", "org.xnio.."));

  private final Map<String, Row> rows = new LinkedHashMap<>();

  /**
   * One package.
   *
   * @param module the folder of its Maven module
   * @param name its name below the root package
   * @param imports names of our packages that it may import
   * @param libraries names of libraries that it may import
   */
  record Row(String module, String name, Set<String> imports, Set<String> libraries) {
    boolean isAdapter() {
      return module.startsWith("adapters/") && !module.equals("adapters/contract");
    }

    /** The packages behind its libraries. */
    List<String> libraryPackages() {
      List<String> packages = new ArrayList<>();
      libraries.forEach(library -> packages.addAll(packagesOf(library)));
      return packages;
    }

    @Override
    public String toString() {
      return name;
    }
  }

  /**
   * Reads a table of four columns, parted by bars.
   *
   * @throws IllegalArgumentException when a row imports a package that does not stand above it
   */
  PackageTable(String drawn) {
    drawn.lines().map(PackageTable::row).forEach(this::add);
  }

  private static Row row(String line) {
    String[] cells = line.split("\\|", -1);
    return new Row(cells[0].strip(), cells[1].strip(), words(cells[2]), words(cells[3]));
  }

  private static Set<String> words(String cell) {
    return cell.isBlank() ? Set.of() : new TreeSet<>(List.of(cell.strip().split(" +")));
  }

  private void add(Row row) {
    row.libraryPackages();
    if (!rows.keySet().containsAll(row.imports())) {
      throw new IllegalArgumentException(
          row + " may import only what stands above it in the table, not " + row.imports());
    }
    if (rows.put(row.name(), row) != null) {
      throw new IllegalArgumentException(row + " stands in the table twice");
    }
  }

  List<Row> rows() {
    return List.copyOf(rows.values());
  }

  Set<String> names() {
    return rows.keySet();
  }

  static List<String> packagesOf(String library) {
    List<String> packages = LIBRARIES.get(library);
    if (packages == null) {
      throw new IllegalArgumentException(library + " is no library that the table knows");
    }
    return packages;
  }
}
