package beamwarden.simulated;

import beamwarden.beam.Conditions;
import beamwarden.beam.Point;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.Column;
import beamwarden.instrument.Fault;
import beamwarden.instrument.FaultKind;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.Readings;
import java.util.Optional;
import java.util.function.Consumer;

/** Brings the instrument to conditions and a place, the beam blanked all the while. */
final class Preparing implements Order {
  private final Desk desk;
  private final Consumer<InstrumentEvent> answer;
  private final long request;
  private final Conditions conditions;
  private final Point stage;

  Preparing(Desk desk, long request, Conditions conditions, Point stage) {
    this.desk = desk;
    this.answer = desk.answer();
    this.request = request;
    this.conditions = conditions;
    this.stage = stage;
  }

  @Override
  public void start(Runnable done) {
    Optional<Fault> struck = Measuring.timeout(desk.strike(FaultPlan.Step.PREPARE));
    Optional<Fault> fault =
        struck.or(() -> desk.hardware().unfit()).or(() -> refusal(desk.hardware().abilities()));
    if (fault.isPresent()) {
      answer.accept(new InstrumentEvent.NotPrepared(request, fault.get()));
      done.run();
      return;
    }
    desk.later(desk.hardware().preparation(conditions, stage), () -> arrive(done));
  }

  private void arrive(Runnable done) {
    Optional<Fault> fault = desk.hardware().unfit();
    if (fault.isPresent()) {
      answer.accept(new InstrumentEvent.NotPrepared(request, fault.get()));
    } else {
      desk.hardware().prepare(conditions, stage);
      Readings read = desk.hardware().readings();
      answer.accept(
          new InstrumentEvent.Prepared(request, read.conditions().orElseThrow(), read.stage()));
    }
    done.run();
  }

  private Optional<Fault> refusal(Abilities abilities) {
    if (!abilities.stage().reaches(stage)) {
      return Optional.of(
          new Fault(FaultKind.REGION_UNREACHABLE, "the stage does not reach " + stage));
    }
    return offered(abilities)
        ? Optional.empty()
        : Optional.of(
            new Fault(FaultKind.NOT_OFFERED, "the instrument does not offer " + conditions));
  }

  private boolean offered(Abilities abilities) {
    Column column = abilities.column();
    return abilities.modes().containsKey(conditions.mode())
        && (conditions.filter().equals(Conditions.PANCHROMATIC)
            || abilities.filters().containsKey(conditions.filter()))
        && conditions.beam().voltage().compareTo(column.lowestVoltage()) >= 0
        && conditions.beam().voltage().compareTo(column.highestVoltage()) <= 0
        && conditions.beam().current().compareTo(column.lowestCurrent()) >= 0
        && conditions.beam().current().compareTo(column.highestCurrent()) <= 0;
  }
}
