package beamwarden.document;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.charset.Charset;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import org.junit.jupiter.api.Nested;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.Timeout;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** Texts that would exhaust or mislead a reader: each ends in one clear problem, and soon. */
@Timeout(10)
class HostileTextsTest {
  private static final String TOO_DEEP =
      " error: lists and groups lie more than 16 deep within each other here; close the brackets"
          + " before it; no document needs such a depth";
  private static final String TOO_MANY =
      " error: the document has more than 100000 values; share its jobs out to several queues";
  private static final String TOO_LARGE =
      "0:0: error: the document has more than 1048576 bytes, the most that is read; share its jobs"
          + " out to several queues";

  @Nested
  class Shapes {
    @Test
    void deepListsEndAtTheAllowedDepth() {
      assertEquals(List.of("1:18:" + TOO_DEEP), problems("[".repeat(500_000)));
    }

    @Test
    void deepGroupsEndAtTheAllowedDepth() {
      assertEquals(List.of("1:82:" + TOO_DEEP), problems("{\"a\":".repeat(200_000)));
    }

    @Test
    void deepListsInLinesEndAtTheAllowedDepth() {
      assertEquals(List.of("1:35:" + TOO_DEEP), problems("- ".repeat(300_000)));
    }

    @Test
    void keysWithinKeysEndSomewhere() {
      assertEquals(1, problems("? ".repeat(300_000)).size());
      assertEquals(1, problems("{? ".repeat(300_000)).size());
    }

    @Test
    void manyValuesEndAtTheAllowedNumber() {
      assertEquals(List.of("1:200000:" + TOO_MANY), problems("[" + "1,".repeat(400_000) + "1]"));
    }

    @Test
    void aliasesThatGrowByTenEachLineEndAtTheAllowedNumber() {
      StringBuilder bomb = new StringBuilder("a0: &a0 [x, x, x, x, x, x, x, x, x, x]\n");
      for (int level = 1; level < 10; level++) {
        String alias = "*a" + (level - 1);
        bomb.append("a" + level + ": &a" + level + " [")
            .append((alias + ", ").repeat(9))
            .append(alias)
            .append("]\n");
      }
      assertEquals(List.of("5:45:" + TOO_MANY), problems(bomb.toString()));
    }

    @Test
    void anAliasOfItselfStandsForNothing() {
      assertEquals(
          List.of(
              "1:12: error: the alias *a stands for nothing that ends before it; write the value"
                  + " itself, or mark it with &a further up"),
          problems("queue: &a [*a]"));
    }

    @Test
    void manyAliasesEndAtTheAllowedNumber() {
      assertEquals(
          List.of(
              "2:408: error: the document has more than 100 aliases; write a recipe and let the"
                  + " jobs name it"),
          problems("a: &x 1\nb: [x, " + "*x, ".repeat(200) + "1]"));
    }

    @Test
    void aGroupAsAKeyIsRefused() {
      assertEquals(
          List.of(
              "1:3: error: a key is expected here, not a group of keys; look for a missing"
                  + " bracket, quote or colon, or a wrong indentation, here or just before"),
          problems("? {a: 1}\n: 2"));
    }

    @Test
    void manyMisspeltNamesAreQuick() {
      StringBuilder queue = new StringBuilder("queue: q\nsamples: []\njobs:\n");
      for (int index = 0; index < 9_000; index++) {
        queue.append("  - { id: job-").append(index).append(", after: [jbo-");
        queue.append(index).append("], sample: x, mode: intensty-map }\n");
      }
      assertEquals(Limits.PROBLEMS + 1, problems(queue.toString()).size());
    }

    @Test
    void aLongChainOfJobsIsNoCircle() {
      StringBuilder queue = new StringBuilder("queue: q\nsamples: []\njobs:\n");
      for (int index = 0; index < 10_000; index++) {
        queue.append("  - { id: j").append(index).append(", after: [j");
        queue.append(index + 1).append("] }\n");
      }
      assertTrue(
          problems(queue.toString()).stream().noneMatch(problem -> problem.contains("in turn")));
    }
  }

  @Nested
  class Characters {
    @ParameterizedTest
    @ValueSource(strings = {"", " ", "\n\n", "# nothing but a comment\n", "---\n", "...\n"})
    void nothingAtAllIsToldSo(String text) {
      List<String> problems = problems(text);
      assertEquals(1, problems.size(), problems.toString());
    }

    @Test
    void anEmptyTextIsToldSo() {
      assertEquals(
          List.of("1:1: error: the document is empty; write what it is to say"), problems("#\n"));
    }

    @Test
    void aNulByteIsNamedWithItsPlace() {
      assertEquals(
          List.of(
              "2:9: error: there is a control character here, U+0000; delete it, and check that"
                  + " the file is a text in UTF-8"),
          problems("queue: q\nsamples:\0 []\n"));
    }

    @Test
    void anEscapeSequenceNeverReachesATerminal() {
      String text =
          Samples.QUEUE
              .replace("queue: whole", "queue: \"\\e[2Jwhole\\0\"")
              .replace("label: limestone, polished", "label: \"\\e[2J\"");
      List<String> problems = problems(text);
      assertEquals(
          List.of(
              "1:8: error: \"?[2Jwhole?\" cannot stand in a path or an address; write at most 64"
                  + " letters a-z, digits, - _ and . that begin with a letter or digit, such as"
                  + " first-night",
              "4:12: error: label holds a line break or another control character; write it in"
                  + " one line"),
          problems);
    }

    @Test
    void aLoneHalfOfACharacterIsRefused() {
      assertEquals(1, problems("queue: \ud800\n").size());
      assertEquals(1, problems("queue: \udc00x\n").size());
    }

    @Test
    void aByteOrderMarkIsPassedOver() {
      assertEquals(List.of(), problems("\ufeff" + Samples.QUEUE));
    }

    @Test
    void linesOfEveryKindAreCounted() {
      String windows = Samples.QUEUE.replace("\n", "\r\n").replace("10 kV", "99 kV");
      assertEquals(
          List.of(
              "42:14: error: voltage is 99 kV, above the 30 kV that north-room allows; write 1 kV"
                  + " to 30 kV"),
          problems(windows));
    }

    @Test
    void columnsCountCharactersAndNotHalvesOfThem() {
      String cap = "{ because: \"\ud83d\udd2c\", fluence: 60 kV, over: 0.2 um }";
      assertEquals(
          List.of(
              "18:37: error: fluence: 60 kV is a voltage, where a fluence is expected; write a"
                  + " fluence such as 60 e/nm2"),
          problems(Samples.QUEUE.replace("{ fluence: 60 e/nm2, over: 0.2 um }", cap)));
    }
  }

  @Nested
  class Sizes {
    @Test
    void fiftyMegabytesAreNotRead(@TempDir Path folder) throws IOException {
      Path file = folder.resolve("huge.yaml");
      byte[] chunk = "# nothing to see here, but a lot of it\n".repeat(1000).getBytes(UTF_8);
      try (var out = Files.newOutputStream(file)) {
        for (int written = 0; written < 50_000_000; written += chunk.length) {
          out.write(chunk);
        }
      }
      assertEquals(List.of(TOO_LARGE), Samples.problems(ProfileDocuments.read(file)));
    }

    @Test
    void aTextThatIsTooLargeIsNotRead() {
      assertEquals(List.of(TOO_LARGE), problems("#".repeat(Limits.BYTES + 1)));
      assertEquals(List.of(TOO_LARGE), problems("é".repeat(Limits.BYTES / 2 + 1)));
    }

    @Test
    void aTextOfTheAllowedSizeIsRead() {
      String filled = Samples.QUEUE + "#".repeat(Limits.BYTES - Samples.QUEUE.length());
      assertEquals(List.of(), problems(filled));
    }

    @Test
    void aLongKeyIsNotRepeatedInFull() {
      String problem = problems(Samples.QUEUE + "    " + "k".repeat(900) + ": 1\n").get(0);
      assertTrue(problem.startsWith("55:5: error: " + "k".repeat(60) + "… is no key of a job"));
      assertTrue(problem.length() < 400, problem);
    }
  }

  @Nested
  class FilesOfEveryKind {
    @TempDir Path folder;

    @Test
    void aFileThatIsNotThere() {
      Path file = folder.resolve("nowhere.yaml");
      assertEquals(
          file + ":0:0: error: " + file + " does not exist; check the path", only(file).text());
    }

    @Test
    void aFolder() {
      assertEquals(
          folder
              + " cannot be read: Is a directory; check that it is a file and that you may read"
              + " it",
          only(folder).message() + "; " + only(folder).advice());
    }

    @ParameterizedTest
    @ValueSource(strings = {"ISO-8859-1", "UTF-16", "UTF-16LE", "UTF-32"})
    void aTextInAnotherEncoding(String encoding) throws IOException {
      Path file = folder.resolve("other.yaml");
      Files.write(file, "queue: night\nlabel: 40 µs\n".getBytes(Charset.forName(encoding)));
      Problem problem = only(file);
      assertTrue(problem.advice().contains("UTF-8"), problem.text());
    }

    @Test
    void aByteThatIsNoUtf8IsNamedWithItsPlace() throws IOException {
      Path file = folder.resolve("latin.yaml");
      Files.write(file, "queue: q\nlabel: 40 µs\n".getBytes(StandardCharsets.ISO_8859_1));
      assertEquals(
          file
              + ":2:11: error: the file is not in UTF-8 from here on; save it with the encoding"
              + " UTF-8",
          only(file).text());
    }

    @Test
    void halfACharacterAtTheEnd() throws IOException {
      Path file = folder.resolve("cut.yaml");
      Files.write(file, new byte[] {'q', (byte) 0xc3});
      assertEquals(2, only(file).column());
    }

    private Problem only(Path file) {
      List<Problem> problems = QueueDocuments.read(file, Samples.NORTH_ROOM).problems();
      assertEquals(1, problems.size(), problems.toString());
      return problems.get(0);
    }
  }

  private static final Charset UTF_8 = StandardCharsets.UTF_8;

  private static List<String> problems(String text) {
    return Samples.problems(Samples.queue(text));
  }
}
