package beamwarden.document;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class DocumentsTest {

  /** The first two: the examples of FIPS 180-4 that NIST publishes, and the empty message. */
  @ParameterizedTest
  @CsvSource({
    "abc, ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad",
    "'', e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855"
  })
  void hashesBySha256(String text, String hash) {
    assertEquals(hash, Documents.hash(text));
  }

  @Test
  void givesTheTextOfAFileAsItIs(@TempDir Path folder) throws IOException {
    Path file = folder.resolve("p.yaml");
    Files.writeString(file, "queue: µ\r\n");
    Reading<String> reading = Documents.text(file);
    assertEquals("queue: µ\r\n", reading.value().orElseThrow());
    assertEquals(List.of(), reading.problems());
  }

  @Test
  void readsAFileAsItReadsItsText(@TempDir Path folder) throws IOException {
    Path file = folder.resolve("queue.yaml");
    Files.writeString(file, Samples.QUEUE);
    assertEquals(
        Samples.queue(Samples.QUEUE).value(),
        QueueDocuments.read(file, Samples.NORTH_ROOM).value());
  }
}
