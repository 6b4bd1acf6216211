package beamwarden.simulated;

import beamwarden.instrument.CurrentReading;
import beamwarden.instrument.Fault;
import beamwarden.instrument.FaultKind;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.Readings;
import java.util.Optional;
import java.util.function.Consumer;

/** Measures the current in the cup; the beam is deflected into it and crosses no sample. */
final class Measuring implements Order {
  private final Desk desk;
  private final Consumer<InstrumentEvent> answer;
  private final long request;

  Measuring(Desk desk, long request) {
    this.desk = desk;
    this.answer = desk.answer();
    this.request = request;
  }

  @Override
  public void start(Runnable done) {
    Optional<Fault> fault = timeout(desk.strike(FaultPlan.Step.MEASURE)).or(this::notReady);
    if (fault.isPresent()) {
      answer.accept(new InstrumentEvent.NotMeasured(request, fault.get()));
      done.run();
      return;
    }
    desk.later(desk.hardware().abilities().meter().readingTakes(), () -> read(done));
  }

  private void read(Runnable done) {
    Optional<Fault> fault = notReady();
    answer.accept(
        fault.isPresent()
            ? new InstrumentEvent.NotMeasured(request, fault.get())
            : new InstrumentEvent.Measured(request, reading()));
    done.run();
  }

  private CurrentReading reading() {
    return new CurrentReading(
        desk.hardware().readings().conditions().orElseThrow().beam(),
        desk.hardware().measured().orElseThrow());
  }

  private Optional<Fault> notReady() {
    Readings readings = desk.hardware().readings();
    return desk.hardware()
        .unfit()
        .or(
            () ->
                readings.conditions().isPresent() && !readings.valveClosed()
                    ? Optional.empty()
                    : Optional.of(
                        new Fault(
                            FaultKind.NOT_OFFERED,
                            "no current flows before the instrument is prepared")));
  }

  /** The fault of a detector that was made not to answer. */
  static Optional<Fault> timeout(Optional<FaultPlan.Strike> strike) {
    return strike
        .filter(struck -> struck.mishap() == Mishap.DETECTOR_TIMEOUT)
        .map(
            struck -> new Fault(FaultKind.DETECTOR_TIMEOUT, "the detector did not answer in time"));
  }
}
