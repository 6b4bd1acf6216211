package beamwarden.system;

import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** Some rounds of {@link ProcessTorture}; {@code ops/torture --processes N} runs more. */
class ProcessTortureIT {
  private static final int ROUNDS = Integer.getInteger("processes", 3);
  private static final long SEED = Long.getLong("seed", Torture.SEED);

  @TempDir Path folder;

  @Test
  void theBooksHoldWhenDaemonAndInstrumentAreKilledAtRandomMoments()
      throws IOException, InterruptedException {
    int kills = 0;
    for (int round = 0; round < ROUNDS; round++) {
      Path own = Files.createDirectory(folder.resolve("round-" + round));
      ProcessTorture.Outcome outcome = ProcessTorture.round(SEED + round, own);
      System.out.println(outcome);
      kills += outcome.kills();
    }
    assertTrue(kills >= ROUNDS, "something must be killed in each round");
  }
}
