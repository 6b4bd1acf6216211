package beamwarden.document;

import static org.junit.jupiter.api.Assertions.assertEquals;

import beamwarden.profile.Profile;
import beamwarden.queue.Queue;
import java.nio.file.Path;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class ExamplesTest {
  private static final Path FOLDER =
      Path.of(System.getProperty("beamwarden.root")).resolve("queue-examples");

  @Test
  void theProfileReadsWithoutProblems() {
    assertEquals(List.of(), texts(ProfileDocuments.read(FOLDER.resolve("north-room.yaml"))));
  }

  @ParameterizedTest
  @ValueSource(strings = {"01-first-look.yaml", "01-first-look.json", "02-overnight.yaml"})
  void queuesReadWithoutProblems(String name) {
    assertEquals(List.of(), texts(QueueDocuments.read(FOLDER.resolve(name), northRoom())));
  }

  @Test
  void theSameQueueReadsEqualInYamlAndInJson() {
    Queue yaml =
        QueueDocuments.read(FOLDER.resolve("01-first-look.yaml"), northRoom()).value().get();
    Queue json =
        QueueDocuments.read(FOLDER.resolve("01-first-look.json"), northRoom()).value().get();
    assertEquals(yaml, json);
  }

  private static Profile northRoom() {
    return ProfileDocuments.read(FOLDER.resolve("north-room.yaml")).value().get();
  }

  private static List<String> texts(Reading<?> reading) {
    return reading.problems().stream().map(Problem::text).toList();
  }
}
