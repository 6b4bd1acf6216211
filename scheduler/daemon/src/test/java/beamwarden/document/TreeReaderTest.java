package beamwarden.document;

import static org.junit.jupiter.api.Assertions.assertEquals;

import beamwarden.document.Node.Mapping;
import beamwarden.document.Node.Mark;
import beamwarden.document.Node.Scalar;
import beamwarden.document.Node.Sequence;
import java.util.List;
import java.util.Optional;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class TreeReaderTest {

  @Test
  void givesEveryNodeItsMarkAndItsPlace() {
    assertEquals(
        List.of(
            "1:1 : group",
            "1:4 a: one",
            "2:4 b: list",
            "2:5 b[0]: x",
            "2:8 b[1]: group",
            "2:12 b[1].c: two words",
            "3:4 d: ~"),
        flat("a: one\nb: [x, {c: 'two words'}]\nd: ~\n"));
  }

  @Test
  void readsTheSameTreeFromJsonAsFromYaml() {
    assertEquals(
        shape("queue: q\njobs:\n- id: a\n  pixels: [5, 6]\n  also: null\n"),
        shape("{\"queue\":\"q\",\"jobs\":[{\"id\":\"a\",\"pixels\":[5,6],\"also\":null}]}"));
  }

  @Test
  void readsJsonThatIsIndentedByTabs() {
    assertEquals(
        List.of("1:1 : group", "2:8 q: list", "3:3 q[0]: 1", "4:3 q[1]: 2"),
        flat("{\n\t\"q\"\t: [\n\t\t1,\n\t\t2\n\t]\n}"));
  }

  /** The escapes of RFC 8259, section 7. */
  @ParameterizedTest
  @CsvSource({
    "\\u0041, A",
    "\\u00b5, µ",
    "\\ud83d\\udd2c, \ud83d\udd2c",
    "\\/, /",
    "\\\\, \\",
    "\\\", '\"'"
  })
  void readsTheEscapesOfJson(String written, String meant) {
    assertEquals(List.of("1:1 : group", "1:6 q: " + meant), flat("{\"q\":\"" + written + "\"}"));
  }

  @Test
  void keepsValuesAsTheyAreWritten() {
    assertEquals(
        List.of(
            "1:1 : group",
            "1:4 a: 0777",
            "2:4 b: 19:00",
            "3:4 c: 1e3",
            "4:4 d: 2031-03-08",
            "5:4 e: yes"),
        flat("a: 0777\nb: 19:00\nc: 1e3\nd: 2031-03-08\ne: yes\n"));
  }

  @Test
  void letsAnAliasStandForWhatItsAnchorMarks() {
    assertEquals(
        List.of("1:1 : group", "1:4 a: list", "1:8 a[0]: x", "1:4 a: list", "1:8 a[0]: x"),
        flat("a: &l [x]\nb: *l\n"));
  }

  @Test
  void keepsTheFirstOfTwoEqualKeysAndTellsEveryOther() {
    Problems problems = new Problems("t");
    Node top = TreeReader.read("a: 1\nb: 2\na: 3\n\"a\": 4\n", problems).orElseThrow();
    assertEquals(List.of("1:1 : group", "1:4 a: 1", "2:4 b: 2"), flat(top).toList());
    assertEquals(
        List.of(
            "3:1: error: a is given twice, first in line 1; keep one of the two",
            "4:1: error: a is given twice, first in line 1; keep one of the two"),
        Samples.problems(problems.reading(Optional.empty())));
  }

  private static List<String> shape(String text) {
    return flat(text).stream().map(line -> line.substring(line.indexOf(' ') + 1)).toList();
  }

  private static List<String> flat(String text) {
    Problems problems = new Problems("t");
    List<String> lines =
        TreeReader.read(text, problems).stream().flatMap(TreeReaderTest::flat).toList();
    assertEquals(List.of(), Samples.problems(problems.reading(Optional.empty())));
    return lines;
  }

  private static Stream<String> flat(Node node) {
    Mark mark = node.mark();
    String at = mark.line() + ":" + mark.column() + " " + node.place() + ": ";
    if (node instanceof Scalar scalar) {
      return Stream.of(at + scalar.text());
    }
    List<Node> inner =
        node instanceof Sequence list
            ? list.items()
            : ((Mapping) node).fields().stream().map(Node.Field::value).toList();
    String kind = node instanceof Sequence ? "list" : "group";
    return Stream.concat(Stream.of(at + kind), inner.stream().flatMap(TreeReaderTest::flat));
  }
}
