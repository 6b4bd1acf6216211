package beamwarden.simulated;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.instrument.GrantFate;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.Receipt;
import java.time.Duration;
import java.util.HashMap;
import java.util.HashSet;
import java.util.Map;
import java.util.Set;
import java.util.SplittableRandom;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/**
 * Nights of random faults. Goal: whatever goes wrong, the adapter's word is never below the truth.
 * Method: a simple daemon exposes grant after grant, restarts what dies, seals, and holds every
 * fate against the hardware's own record. A failing seed is replayed by its own test case.
 */
class RandomNightTest {
  private static final int GRANTS = 60;

  @ParameterizedTest
  @ValueSource(ints = {0, 1, 2, 3, 4, 5, 6, 7, 8, 9})
  void theAdaptersWordIsNeverBelowTheTruth(int decade) {
    for (long seed = decade * 20L; seed < decade * 20L + 20; seed++) {
      night(seed);
    }
  }

  private static void night(long seed) {
    FaultPlan faults = new RandomFaults(seed, 0.05);
    Session session = new Session(Simulation.inMemory(seed).with(faults));
    SplittableRandom random = new SplittableRandom(seed);
    Set<Long> sent = new HashSet<>();
    Map<Long, GrantFate> fates = new HashMap<>();
    for (long number = 1; number <= GRANTS; number++) {
      session.heard.clear();
      begin(session, number, random);
      sent.add(number);
      if (random.nextInt(5) == 0) {
        session.restarted();
      }
      session.pass(Duration.ofMinutes(random.nextInt(30)));
      ask(session, sent, fates, seed);
    }
    sent.forEach(number -> check(session, number, fates.get(number), seed));
  }

  private static void begin(Session session, long number, SplittableRandom random) {
    try {
      session.ready();
      if (random.nextBoolean()) {
        session.expose(session.map(number, 1 + random.nextInt(500)));
      } else {
        session.expose(session.spot(number, Duration.ofSeconds(1 + random.nextInt(900))));
      }
    } catch (AssertionError noAnswer) {
      // The connection or the process was gone: nothing was begun, and the seal will say so.
      assertTrue(session.all(InstrumentEvent.Lost.class).size() > 0);
    }
  }

  /** Restarts until a seal is answered, as an adapter may die while it seals. */
  private static void ask(Session session, Set<Long> sent, Map<Long, GrantFate> fates, long seed) {
    int answered = session.all(InstrumentEvent.Sealed.class).size();
    for (int attempt = 0; attempt < 50; attempt++) {
      session.restarted();
      session.connect();
      session.seal(sent);
      if (session.all(InstrumentEvent.Sealed.class).size() > answered) {
        Map<Long, GrantFate> now = session.last(InstrumentEvent.Sealed.class).report().fates();
        fates.forEach((number, fate) -> assertEquals(fate, now.get(number), "seed " + seed));
        fates.putAll(now);
        return;
      }
    }
    throw new AssertionError("no seal was answered, seed " + seed);
  }

  private static void check(Session session, long number, GrantFate fate, long seed) {
    var delivered =
        session.truth.stretches().stream()
            .filter(one -> one.grant().orElseThrow() == number)
            .toList();
    String message = "grant " + number + " of seed " + seed;
    if (fate instanceof GrantFate.NeverBegun) {
      assertEquals(0, delivered.size(), message);
    } else if (fate instanceof GrantFate.Reported reported) {
      Receipt receipt = reported.receipt();
      double electrons = delivered.stream().mapToDouble(Stretch::electrons).sum();
      double most =
          receipt
              .highestCurrent()
              .map(shown -> shown.current().electronsIn(receipt.beamOn()))
              .orElse(0.0);
      assertTrue(electrons <= most * (1 + 1e-12), message);
      assertTrue(receipt.unitsTouched() > 0 || delivered.isEmpty(), message);
    }
  }
}
