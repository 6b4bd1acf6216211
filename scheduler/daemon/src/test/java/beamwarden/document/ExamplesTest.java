package beamwarden.document;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.profile.Profile;
import beamwarden.queue.Queue;
import java.nio.file.Path;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class ExamplesTest {
  private static final Profile NORTH_ROOM =
      ProfileDocuments.read(example("north-room.yaml")).value().orElseThrow();

  @Test
  void theProfileReadsWithoutProblems() {
    assertEquals(List.of(), Samples.problems(ProfileDocuments.read(example("north-room.yaml"))));
  }

  @ParameterizedTest
  @ValueSource(strings = {"01-first-look.yaml", "01-first-look.json", "02-overnight.yaml"})
  void queuesReadWithoutProblems(String name) {
    assertEquals(List.of(), Samples.problems(QueueDocuments.read(example(name), NORTH_ROOM)));
  }

  @Test
  void theSameQueueReadsEqualInYamlAndInJson() {
    assertEquals(queue("01-first-look.yaml"), queue("01-first-look.json"));
  }

  @ParameterizedTest
  @ValueSource(
      strings = {
        "north-room.yaml",
        "01-first-look.yaml",
        "01-first-look.json",
        "02-overnight.yaml"
      })
  void theReadmeNamesEveryExample(String name) {
    assertTrue(Samples.text(example("README.md")).contains("`" + name + "`"));
  }

  private static Queue queue(String name) {
    return QueueDocuments.read(example(name), NORTH_ROOM).value().orElseThrow();
  }

  private static Path example(String name) {
    return Samples.EXAMPLES.resolve(name);
  }
}
