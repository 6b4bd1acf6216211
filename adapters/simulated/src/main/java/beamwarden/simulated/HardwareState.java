package beamwarden.simulated;

import beamwarden.beam.BeamSettings;
import beamwarden.beam.Conditions;
import beamwarden.beam.Mode;
import beamwarden.beam.Point;
import beamwarden.quantity.Current;
import beamwarden.quantity.Voltage;
import java.time.Instant;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;

/** What a real instrument remembers by itself. Owned by {@link Hardware}. */
final class HardwareState {
  private static final Logger LOGGER = LoggerFactory.getLogger(HardwareState.class);

  /** When the instrument was first switched on. */
  Instant opened;

  /** How many chamber sessions there have been. */
  long session = 1;

  /** What it is set to. */
  Optional<Conditions> conditions = Optional.empty();

  /** Where the stage was sent. */
  Point stage = new Point(0, 0);

  /** How often the stage has been moved: each move ends a little elsewhere. */
  long moves;

  /** How often the column has been set: each setting has a current of its own. */
  long settings;

  /** Whether the column valve is closed. */
  boolean valveClosed = true;

  /** Until when the door stands open, or the epoch. */
  Instant doorOpenUntil = Instant.EPOCH;

  /** Until when the high voltage is tripped, or the epoch. */
  Instant trippedUntil = Instant.EPOCH;

  /** From when on the current surges. */
  Instant surgeFrom = Instant.EPOCH;

  /** Until when the current surges, or the epoch. */
  Instant surgeUntil = Instant.EPOCH;

  /** By what factor the current surges. */
  double surgeFactor = 1;

  /** How many grants have been exposed. */
  long exposed;

  /** What the scan engine is doing. */
  Optional<Run> run = Optional.empty();

  /** The state of an instrument that is switched on for the first time. */
  HardwareState(Instant opened) {
    this.opened = opened;
  }

  String line() {
    List<Object> words =
        new ArrayList<>(
            List.of(
                opened,
                session,
                stage.xMetres(),
                stage.yMetres(),
                moves,
                settings,
                valveClosed,
                doorOpenUntil,
                trippedUntil,
                surgeFrom,
                surgeUntil,
                surgeFactor,
                exposed,
                conditions.isPresent()));
    conditions.ifPresent(known -> words.addAll(words(known)));
    words.add(run.isPresent());
    run.ifPresent(running -> words.addAll(running.words()));
    return Words.line(words);
  }

  /**
   * What was written last; empty when nothing was, or when it cannot be read. Then the instrument
   * was off in between, and begins anew with another chamber session.
   */
  static Optional<HardwareState> remembered(List<String> lines) {
    try {
      return lines.stream().findFirst().map(line -> read(Words.of(line)));
    } catch (IllegalArgumentException damaged) {
      LOGGER.warn("the simulated hardware has lost its memory: {}", damaged.getMessage());
      return Optional.empty();
    }
  }

  private static HardwareState read(Words words) {
    HardwareState state = new HardwareState(Instant.parse(words.text()));
    state.session = words.whole();
    state.stage = new Point(words.number(), words.number());
    state.moves = words.whole();
    state.settings = words.whole();
    state.valveClosed = words.yes();
    state.doorOpenUntil = Instant.parse(words.text());
    state.trippedUntil = Instant.parse(words.text());
    state.surgeFrom = Instant.parse(words.text());
    state.surgeUntil = Instant.parse(words.text());
    state.surgeFactor = words.number();
    state.exposed = words.whole();
    state.conditions = words.yes() ? Optional.of(conditions(words)) : Optional.empty();
    state.run = words.yes() ? Optional.of(Run.read(words)) : Optional.empty();
    return state;
  }

  private static List<Object> words(Conditions conditions) {
    BeamSettings beam = conditions.beam();
    return List.of(
        beam.voltage().volts(), beam.current().amperes(), conditions.mode(), conditions.filter());
  }

  private static Conditions conditions(Words words) {
    BeamSettings beam = new BeamSettings(new Voltage(words.number()), new Current(words.number()));
    return new Conditions(beam, Mode.valueOf(words.text()), words.text());
  }
}
