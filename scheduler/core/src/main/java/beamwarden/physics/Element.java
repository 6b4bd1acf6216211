package beamwarden.physics;

import java.io.BufferedReader;
import java.io.IOException;
import java.io.InputStreamReader;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.util.Map;
import java.util.Optional;
import java.util.function.Function;
import java.util.stream.Collectors;

/**
 * A chemical element.
 *
 * @param number its atomic number Z
 * @param symbol its symbol, such as {@code Si}
 * @param weight its standard atomic weight (IUPAC 2021, abridged), in g/mol
 */
record Element(int number, String symbol, double weight) {
  private static final String TABLE = "elements.tsv";
  private static final Map<String, Element> BY_SYMBOL = read();

  /** The element of that symbol, or empty when it is none or has no standard atomic weight. */
  static Optional<Element> of(String symbol) {
    return Optional.ofNullable(BY_SYMBOL.get(symbol));
  }

  /** How many elements are known. */
  static int count() {
    return BY_SYMBOL.size();
  }

  private static Map<String, Element> read() {
    try (BufferedReader lines =
        new BufferedReader(
            new InputStreamReader(
                Element.class.getResourceAsStream(TABLE), StandardCharsets.UTF_8))) {
      return lines
          .lines()
          .filter(line -> !line.startsWith("#"))
          .map(line -> line.split("\t", -1))
          .map(
              cells ->
                  new Element(Integer.parseInt(cells[0]), cells[1], Double.parseDouble(cells[2])))
          .collect(Collectors.toUnmodifiableMap(Element::symbol, Function.identity()));
    } catch (IOException e) {
      throw new UncheckedIOException("the table of elements cannot be read", e);
    }
  }
}
