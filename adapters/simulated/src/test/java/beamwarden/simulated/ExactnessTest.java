package beamwarden.simulated;

import static org.junit.jupiter.api.Assertions.assertEquals;

import beamwarden.beam.Point;
import beamwarden.instrument.Grant;
import beamwarden.instrument.InstrumentEvent;
import java.time.Duration;
import java.time.Instant;
import org.junit.jupiter.api.Test;

/** Without noise what is delivered is what was planned, to the nanosecond and the electron. */
class ExactnessTest {
  private final Session session = Session.exact();

  @Test
  void deliversCurrentTimesTimeOverTheElementaryCharge() {
    session.expose(session.map(1, 500));
    session.pass(Duration.ofMinutes(1));
    // N = I·t/e with e = 1.602176634e-19 C (SI Brochure, 9th edition): 350 pA for 12.5 s.
    assertEquals(350e-12 * 12.5 / 1.602176634e-19, session.electrons(), 1);
    assertEquals(500, session.receipt().unitsDone());
    assertEquals(500, session.receipt().unitsTouched());
    assertEquals(Duration.ofMillis(12_500), session.receipt().beamOn());
  }

  @Test
  void writesOneRectangleWhereItWasAsked() {
    session.expose(session.map(1, 100));
    session.pass(Duration.ofMinutes(1));
    assertEquals(1, session.truth.stretches().size());
    Stretch stretch = session.truth.stretches().get(0);
    assertEquals(100e-6, stretch.widthMetres(), 1e-18);
    assertEquals(10e-6, stretch.heightMetres(), 1e-18);
    assertEquals(0, stretch.centre().xMetres(), 1e-18);
    assertEquals(20e-6, stretch.centre().yMetres(), 1e-18);
    assertEquals(350e-12, stretch.currentAmperes());
  }

  @Test
  void takesTheTimesThatTheAbilitiesSay() {
    Grant grant = session.map(1, 500);
    session.instrument.prepare(7, Lab.VIOLET, grant.exposure().stageTarget());
    Instant from = session.time.instant();
    awaitNext(InstrumentEvent.Prepared.class);
    // 12 min to settle, 4 s for the filter, 12.4 mm at 1 mm/s with 10 mm/s²: 12.4 + 0.1 + 2 s.
    assertEquals(
        Duration.ofMillis(12 * 60_000 + 4_000 + 14_500),
        Duration.between(from, session.time.instant()));
    session.instrument.begin(session.fresh(grant));
    from = session.time.instant();
    awaitNext(InstrumentEvent.Ended.class);
    assertEquals(
        Lab.FRAME_START.plus(grant.exposure().scan().duration()),
        Duration.between(from, session.time.instant()));
  }

  @Test
  void measuresTheNominalCurrent() {
    session.prepare(Lab.VIOLET, new Point(0, 0));
    session.instrument.measure(9);
    awaitNext(InstrumentEvent.Measured.class);
    assertEquals(
        350e-12, session.last(InstrumentEvent.Measured.class).reading().current().amperes());
  }

  @Test
  void restsAtASpotForItsTime() {
    session.expose(session.spot(1, Duration.ofSeconds(30)));
    session.pass(Duration.ofMinutes(1));
    Stretch spot = session.truth.stretches().get(0);
    assertEquals(Stretch.Shape.SPOT, spot.shape());
    assertEquals(15e-12 * 30 / 1.602176634e-19, spot.electrons(), 1);
    assertEquals(new Point(0, 8e-6), spot.centre());
    assertEquals(30_000_000_000L, session.receipt().unitsDone());
  }

  private void awaitNext(Class<? extends InstrumentEvent> kind) {
    int before = session.all(kind).size();
    while (session.all(kind).size() == before) {
      session.time.runNext();
    }
  }
}
