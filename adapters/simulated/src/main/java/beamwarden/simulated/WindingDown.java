package beamwarden.simulated;

import beamwarden.instrument.InstrumentEvent;
import java.time.Duration;
import java.util.function.Consumer;

/** Closes the column valve; the beam is blanked before. */
final class WindingDown implements Order {
  /** How long the valve takes. */
  static final Duration TAKES = Duration.ofSeconds(5);

  private final Desk desk;
  private final Consumer<InstrumentEvent> answer;

  WindingDown(Desk desk) {
    this.desk = desk;
    this.answer = desk.answer();
  }

  @Override
  public void start(Runnable done) {
    desk.later(
        TAKES,
        () -> {
          desk.hardware().closeValve();
          answer.accept(new InstrumentEvent.WoundDown(desk.hardware().readings()));
          done.run();
        });
  }
}
