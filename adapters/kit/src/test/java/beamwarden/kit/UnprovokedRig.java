package beamwarden.kit;

import beamwarden.beam.BeamSettings;
import beamwarden.beam.Placement;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.Instrument;
import java.time.Duration;
import java.util.List;
import java.util.Optional;

/** A rig whose author can make no fault and has no record, around an honest adapter. */
record UnprovokedRig(PlainRig rig) implements Rig {
  private static final Provocation NEVER = Provocation.impossible("the lab forbids it");

  @Override
  public Instrument instrument() {
    return rig.instrument();
  }

  @Override
  public Abilities abilities() {
    return rig.abilities();
  }

  @Override
  public Passage time() {
    return rig.time();
  }

  @Override
  public Duration beat() {
    return rig.beat();
  }

  @Override
  public BeamSettings settings() {
    return rig.settings();
  }

  @Override
  public Placement placement() {
    return rig.placement();
  }

  @Override
  public void restart() {
    rig.restart();
  }

  @Override
  public Provocation doorOpens() {
    return NEVER;
  }

  @Override
  public Provocation currentRises() {
    return NEVER;
  }

  @Override
  public Provocation connectionBreaks() {
    return NEVER;
  }

  @Override
  public Optional<List<Stretch>> truth() {
    return Optional.empty();
  }

  @Override
  public void close() {
    rig.close();
  }
}
