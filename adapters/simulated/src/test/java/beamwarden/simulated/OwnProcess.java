package beamwarden.simulated;

import beamwarden.beam.Exposure;
import beamwarden.beam.Placement;
import beamwarden.beam.Point;
import beamwarden.beam.SpotScan;
import beamwarden.instrument.AdapterProvider;
import beamwarden.instrument.Grant;
import beamwarden.instrument.Instrument;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.timing.PacedTime;
import beamwarden.timing.TimeAnchor;
import java.nio.file.Path;
import java.time.Duration;
import java.time.Instant;
import java.util.Map;
import java.util.Set;
import java.util.concurrent.CountDownLatch;

/**
 * A process of its own that exposes one grant of an hour, says {@code exposing} whenever it is some
 * way into it, and goes on until it is killed. Arguments: folder, the anchor's moment on the wall,
 * the pace.
 */
final class OwnProcess {
  static final Duration SCAN = Duration.ofHours(1);

  private static String session = "";

  private OwnProcess() {}

  public static void main(String[] arguments) throws InterruptedException {
    PacedTime time =
        new PacedTime(
            anchor(Instant.parse(arguments[1]), Double.parseDouble(arguments[2])), "own-process");
    Instrument instrument = open(Path.of(arguments[0]), time);
    instrument.connect(event -> on(instrument, event));
    new CountDownLatch(1).await();
  }

  static TimeAnchor anchor(Instant wall, double pace) {
    return new TimeAnchor(Session.EVENING, wall, pace);
  }

  static Instrument open(Path folder, PacedTime time) {
    return new SimulatedProvider()
        .open(new AdapterProvider.Setting(Lab.abilities(), folder, Map.of("noise", "off")), time);
  }

  private static void on(Instrument instrument, InstrumentEvent event) {
    if (event instanceof InstrumentEvent.Connected connected) {
      session = connected.session();
      instrument.seal(1, Session.STORE, Set.of(), false);
      instrument.prepare(1, Lab.COUNTING, Lab.MIDDLE);
    } else if (event instanceof InstrumentEvent.Prepared) {
      instrument.heartbeat(1);
      instrument.begin(grant());
    } else if (event instanceof InstrumentEvent.Progress) {
      System.out.println("exposing");
    }
  }

  private static Grant grant() {
    Exposure exposure =
        new Exposure(
            "emitter",
            0,
            "abs-3",
            new Placement(new Point(0, 0), 0, 3e-6),
            Lab.COUNTING,
            new SpotScan(Lab.MIDDLE, SCAN));
    return new Grant(
        1,
        Session.STORE,
        1,
        session,
        exposure,
        SCAN.plusSeconds(1),
        Session.highest(Lab.COUNTING),
        1,
        Duration.ofHours(1),
        Duration.ofHours(9),
        "head");
  }
}
