package beamwarden.document;

import beamwarden.document.Node.Field;
import beamwarden.document.Node.Mapping;
import beamwarden.document.Node.Mark;
import beamwarden.document.Node.Scalar;
import beamwarden.document.Node.Sequence;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.Iterator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.snakeyaml.engine.v2.api.LoadSettings;
import org.snakeyaml.engine.v2.api.lowlevel.Parse;
import org.snakeyaml.engine.v2.common.Anchor;
import org.snakeyaml.engine.v2.events.AliasEvent;
import org.snakeyaml.engine.v2.events.CollectionStartEvent;
import org.snakeyaml.engine.v2.events.Event;
import org.snakeyaml.engine.v2.events.NodeEvent;
import org.snakeyaml.engine.v2.events.ScalarEvent;
import org.snakeyaml.engine.v2.exceptions.MarkedYamlEngineException;
import org.snakeyaml.engine.v2.exceptions.YamlEngineException;

/**
 * Makes a tree of nodes of a text in YAML 1.2, of which JSON is a part.
 *
 * <p>It works on the parser's events and constructs no object of any kind. Events are drawn one at
 * a time and counted against {@link Limits}, so that a hostile text costs no more than an honest
 * one of the allowed size.
 */
final class TreeReader {
  private static final Mark BEGINNING = new Mark(1, 1);
  private static final String BROKEN_ADVICE =
      "look for a missing bracket, quote or colon, or a wrong indentation, here or just before";

  private final Problems problems;
  private final Iterator<Event> events;
  private final Map<Anchor, Anchored> anchors = new HashMap<>();
  private int nodes;
  private int aliases;

  /** A node that aliases may stand for, and how many nodes it consists of. */
  private record Anchored(Node node, int nodes) {}

  /** Ends the reading: the text cannot be made a tree. */
  private static final class Unreadable extends RuntimeException {
    private final transient Mark mark;
    private final String advice;

    Unreadable(Mark mark, String message, String advice) {
      super(message);
      this.mark = mark;
      this.advice = advice;
    }
  }

  private TreeReader(String text, Problems problems) {
    this.problems = problems;
    LoadSettings settings = LoadSettings.builder().build();
    this.events = new Parse(settings).parseString(text).iterator();
  }

  /** The top node of a text, or empty when there is a problem that leaves none. */
  static Optional<Node> read(String text, Problems problems) {
    try {
      return Optional.of(new TreeReader(text, problems).document());
    } catch (Unreadable unreadable) {
      problems.error(unreadable.mark, unreadable.getMessage(), unreadable.advice);
    } catch (MarkedYamlEngineException broken) {
      Mark mark =
          broken
              .getProblemMark()
              .or(broken::getContextMark)
              .map(place -> new Mark(place.getLine() + 1, place.getColumn() + 1))
              .orElse(BEGINNING);
      problems.error(mark, unreadable(broken.getProblem()), advice(broken.getProblem()));
    } catch (YamlEngineException broken) {
      problems.error(BEGINNING, unreadable(broken.getMessage()), BROKEN_ADVICE);
    }
    return Optional.empty();
  }

  private static String advice(String why) {
    return why != null && why.contains("TAB") ? "indent with blanks, not with tabs" : BROKEN_ADVICE;
  }

  private static String unreadable(String why) {
    String known =
        Optional.ofNullable(why).orElse("unknown").replaceAll("\\.? ?\\([^)]*\\)\\.?", "");
    return "the text is neither YAML nor JSON: " + Printed.quoted(known);
  }

  private Node document() {
    Event event = events.next();
    while (event.getEventId() == Event.ID.StreamStart || comes(event, Event.ID.DocumentStart)) {
      event = events.next();
    }
    if (event.getEventId() == Event.ID.StreamEnd) {
      throw new Unreadable(BEGINNING, "the document is empty", "write what it is to say");
    }
    Node top = node(event, Place.TOP, 0);
    events.next();
    Event after = events.next();
    if (after.getEventId() != Event.ID.StreamEnd) {
      throw new Unreadable(
          mark(after), "a second document begins here", "keep one document in each file");
    }
    return top;
  }

  private static boolean comes(Event event, Event.ID id) {
    return event.getEventId() == id;
  }

  private Node node(Event event, Place place, int depth) {
    Mark mark = mark(event);
    count(1, mark);
    if (depth > Limits.NESTING) {
      throw new Unreadable(
          mark,
          "lists and groups lie more than " + Limits.NESTING + " deep within each other here",
          "close the brackets before it; no document needs such a depth");
    }
    if (event instanceof AliasEvent alias) {
      return aliased(alias, mark);
    }
    int before = nodes - 1;
    Node node = made(event, place, mark, depth);
    if (tagged(event)) {
      problems.error(node, "a tag with ! has no meaning here", "leave the tag out");
    }
    NodeEvent own = (NodeEvent) event;
    own.getAnchor().ifPresent(name -> anchors.put(name, new Anchored(node, nodes - before)));
    return node;
  }

  private void count(int more, Mark mark) {
    nodes += more;
    if (nodes > Limits.NODES) {
      throw new Unreadable(
          mark,
          "the document has more than " + Limits.NODES + " values",
          "share its jobs out to several queues");
    }
  }

  private Node made(Event event, Place place, Mark mark, int depth) {
    return switch (event.getEventId()) {
      case Scalar -> scalar((ScalarEvent) event, place, mark);
      case SequenceStart -> sequence(place, mark, depth);
      case MappingStart -> mapping(place, mark, depth);
      default ->
          throw new Unreadable(mark, "a value is expected here, and there is none", BROKEN_ADVICE);
    };
  }

  private static boolean tagged(Event event) {
    return event instanceof ScalarEvent scalar
        ? scalar.getTag().isPresent()
        : event instanceof CollectionStartEvent collection && collection.getTag().isPresent();
  }

  private Scalar scalar(ScalarEvent event, Place place, Mark mark) {
    return new Scalar(mark, place, event.getValue(), event.isPlain());
  }

  private Node aliased(AliasEvent alias, Mark mark) {
    String name = Printed.quoted(alias.getAlias().getValue());
    if (++aliases > Limits.ALIASES) {
      throw new Unreadable(
          mark,
          "the document has more than " + Limits.ALIASES + " aliases",
          "write a recipe and let the jobs name it");
    }
    Anchored meant = anchors.get(alias.getAlias());
    if (meant == null) {
      throw new Unreadable(
          mark,
          "the alias *" + name + " stands for nothing that ends before it",
          "write the value itself, or mark it with &" + name + " further up");
    }
    count(meant.nodes() - 1, mark);
    return meant.node();
  }

  private Sequence sequence(Place place, Mark mark, int depth) {
    List<Node> items = new ArrayList<>();
    for (Event next = events.next(); !comes(next, Event.ID.SequenceEnd); next = events.next()) {
      items.add(node(next, place.item(items.size()), depth + 1));
    }
    return new Sequence(mark, place, List.copyOf(items));
  }

  private Mapping mapping(Place place, Mark mark, int depth) {
    Map<String, Field> fields = new LinkedHashMap<>();
    for (Event next = events.next(); !comes(next, Event.ID.MappingEnd); next = events.next()) {
      Node key = node(next, place, depth + 1);
      if (!(key instanceof Scalar named)) {
        throw new Unreadable(
            key.mark(), "a key is expected here, not " + key.kind(), BROKEN_ADVICE);
      }
      Place within = place.key(named.text());
      Node value = node(events.next(), within, depth + 1);
      Scalar placed = new Scalar(named.mark(), within, named.text(), named.plain());
      add(fields, new Field(placed, value));
    }
    return new Mapping(mark, place, List.copyOf(fields.values()));
  }

  private void add(Map<String, Field> fields, Field field) {
    Field first = fields.putIfAbsent(field.key().text(), field);
    if (first != null) {
      problems.error(
          field.key(),
          Printed.quoted(field.key().text())
              + " is given twice, first in line "
              + first.key().mark().line(),
          "keep one of the two");
    }
  }

  private static Mark mark(Event event) {
    return event
        .getStartMark()
        .map(mark -> new Mark(mark.getLine() + 1, mark.getColumn() + 1))
        .orElse(BEGINNING);
  }
}
