package beamwarden.physics;

import java.util.LinkedHashMap;
import java.util.Map;

/**
 * A chemical formula, such as {@code SiO2}, {@code Ca(OH)2} or {@code Al0.3Ga0.7As}.
 *
 * <p>Brackets may be nested, round or square; a count is a decimal number above zero and stands
 * behind what it counts.
 */
public final class Formula {
  private final Map<Element, Double> counts;

  private Formula(Map<Element, Double> counts) {
    this.counts = counts;
  }

  /**
   * Reads a formula.
   *
   * @throws IllegalArgumentException with the place and the reason when it cannot be read
   */
  public static Formula parse(String text) {
    return new Formula(new Reader(text).formula());
  }

  /** The part of the mass that each element has; the parts add up to 1. */
  Map<Element, Double> massParts() {
    double total =
        counts.entrySet().stream().mapToDouble(e -> e.getValue() * e.getKey().weight()).sum();
    Map<Element, Double> parts = new LinkedHashMap<>();
    counts.forEach((element, count) -> parts.put(element, count * element.weight() / total));
    return parts;
  }

  /** Walks through the text once, from left to right. */
  private static final class Reader {
    private static final String OPENING = "([";
    private static final String CLOSING = ")]";

    private final String text;
    private int at;

    Reader(String text) {
      this.text = text;
    }

    Map<Element, Double> formula() {
      Map<Element, Double> counts = group();
      if (at < text.length()) {
        throw problem(
            isOneOf(CLOSING) ? "nothing was opened that could close" : "an element was expected");
      }
      if (counts.isEmpty()) {
        throw problem("an element was expected");
      }
      return counts;
    }

    /** Elements and groups up to the end or to what is no part of this group. */
    private Map<Element, Double> group() {
      Map<Element, Double> counts = new LinkedHashMap<>();
      while (at < text.length()) {
        if (isOneOf(OPENING)) {
          Map<Element, Double> inner = bracketed();
          double times = count();
          inner.forEach((element, count) -> counts.merge(element, count * times, Double::sum));
        } else if (isUpperCase()) {
          Element element = element();
          counts.merge(element, count(), Double::sum);
        } else {
          break;
        }
      }
      return counts;
    }

    private Map<Element, Double> bracketed() {
      int opened = at;
      char closing = CLOSING.charAt(OPENING.indexOf(text.charAt(at++)));
      Map<Element, Double> inner = group();
      if (at >= text.length() || text.charAt(at) != closing) {
        if (at >= text.length()) {
          at = opened;
          throw problem("this bracket is never closed");
        }
        throw problem("an element or '" + closing + "' was expected");
      }
      if (inner.isEmpty()) {
        throw problem("an element was expected");
      }
      at++;
      return inner;
    }

    private Element element() {
      int from = at++;
      while (at < text.length() && text.charAt(at) >= 'a' && text.charAt(at) <= 'z') {
        at++;
      }
      String symbol = text.substring(from, at);
      return Element.of(symbol)
          .orElseThrow(
              () -> {
                at = from;
                return problem("no element " + symbol + " with a standard atomic weight is known");
              });
    }

    private double count() {
      int from = at;
      while (at < text.length() && "0123456789.".indexOf(text.charAt(at)) >= 0) {
        at++;
      }
      if (from == at) {
        return 1;
      }
      String number = text.substring(from, at);
      if (!number.matches("[0-9]{1,9}(\\.[0-9]{1,9})?") || Double.parseDouble(number) == 0) {
        at = from;
        throw problem("a count above zero was expected, not " + number);
      }
      return Double.parseDouble(number);
    }

    private boolean isOneOf(String characters) {
      return characters.indexOf(text.charAt(at)) >= 0;
    }

    private boolean isUpperCase() {
      return text.charAt(at) >= 'A' && text.charAt(at) <= 'Z';
    }

    private IllegalArgumentException problem(String reason) {
      return new IllegalArgumentException(
          "formula '" + text + "', character " + (at + 1) + ": " + reason);
    }
  }
}
