package beamwarden.simulated;

import beamwarden.beam.Exposure;
import beamwarden.beam.RasterScan;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.Fault;
import beamwarden.instrument.FaultKind;
import beamwarden.instrument.Grant;
import beamwarden.instrument.ModeAbility;
import beamwarden.instrument.Readings;
import java.time.Duration;
import java.util.Optional;
import java.util.OptionalLong;
import java.util.function.Supplier;
import java.util.stream.Stream;

/** Why a grant must not begin: the promises P7 to P9, and what the instrument can do at all. */
final class GrantRules {
  private static final double SAME_PLACE_METRES = 1e-9;

  private final Hardware hardware;
  private final Notes notes;
  private final Heartbeats heartbeats;
  private boolean sealed;

  GrantRules(Hardware hardware, Notes notes, Heartbeats heartbeats) {
    this.hardware = hardware;
    this.notes = notes;
    this.heartbeats = heartbeats;
  }

  /** Whether this connection has sealed the adapter; before that nothing begins. */
  void sealed(boolean isSealed) {
    sealed = isSealed;
  }

  /** Why the adapter may not even keep the grant until its turn comes. */
  Optional<Fault> forbids(Grant grant) {
    if (!sealed || !grant.store().equals(notes.store())) {
      return disagree("the adapter is not sealed by store " + grant.store() + ": seal it first");
    }
    if (grant.fence() != notes.fence()) {
      return disagree(
          "grant %d has fence %d, but the adapter was sealed with fence %d"
              .formatted(grant.number(), grant.fence(), notes.fence()));
    }
    if (notes.isForbidden(grant.number())) {
      return disagree("grant " + grant.number() + " was sealed and can never begin");
    }
    return grant.session().equals(hardware.session())
        ? Optional.empty()
        : disagree(
            "grant %d is for chamber session %s, but this is session %s"
                .formatted(grant.number(), grant.session(), hardware.session()));
  }

  /** Why the grant, whose turn has come, may not begin now. */
  Optional<Fault> refuses(Grant grant) {
    Stream<Supplier<Optional<Fault>>> rules =
        Stream.of(
            () -> forbids(grant),
            hardware::unfit,
            () -> notOffered(grant.exposure()),
            () -> notPrepared(grant.exposure()),
            () -> tooLate(grant),
            () -> leaseOver(grant));
    return rules.map(Supplier::get).flatMap(Optional::stream).findFirst();
  }

  private Optional<Fault> notOffered(Exposure exposure) {
    Abilities abilities = hardware.abilities();
    ModeAbility ability = abilities.modes().get(exposure.conditions().mode());
    if (ability == null) {
      return fault(
          FaultKind.NOT_OFFERED,
          "the instrument does not offer " + exposure.conditions().mode().text());
    }
    return exposure.scan() instanceof RasterScan raster
        ? notOffered(raster, ability)
        : Optional.empty();
  }

  private Optional<Fault> notOffered(RasterScan raster, ModeAbility ability) {
    double largest =
        Math.min(
            hardware.abilities().field().largestMetres(),
            ability.fieldMetres().orElse(Double.POSITIVE_INFINITY));
    double side = Math.max(raster.frame().widthMetres(), raster.frame().heightMetres());
    if (side > largest * (1 + SAME_PLACE_METRES)) {
      return fault(
          FaultKind.NOT_OFFERED,
          "a raster of %s m is larger than the field of %s m".formatted(side, largest));
    }
    boolean offered =
        raster.dwell().compareTo(ability.shortestDwell()) >= 0
            && raster.dwell().compareTo(ability.longestDwell()) <= 0;
    return offered
        ? Optional.empty()
        : fault(
            FaultKind.NOT_OFFERED,
            "a dwell of %s is not between %s and %s"
                .formatted(raster.dwell(), ability.shortestDwell(), ability.longestDwell()));
  }

  private Optional<Fault> notPrepared(Exposure exposure) {
    Readings readings = hardware.readings();
    if (readings.valveClosed()
        || !readings.conditions().equals(Optional.of(exposure.conditions()))) {
      return disagree(
          "the instrument is not prepared for "
              + exposure.conditions()
              + ": it reads back "
              + readings.conditions()
              + (readings.valveClosed() ? ", the column valve closed" : ""));
    }
    double off = readings.stage().distanceMetres(exposure.stageTarget());
    double most = hardware.abilities().stage().repeatabilityMetres() + SAME_PLACE_METRES;
    return off <= most
        ? Optional.empty()
        : disagree("the stage stands %s m from where the grant needs it".formatted(off));
  }

  private Optional<Fault> tooLate(Grant grant) {
    OptionalLong counted = heartbeats.arrival(grant.heartbeat());
    if (counted.isEmpty()) {
      return fault(
          FaultKind.STARTED_TOO_LATE,
          "heartbeat %d, from which grant %d counts, did not come"
              .formatted(grant.heartbeat(), grant.number()));
    }
    return overdue(counted.getAsLong(), grant.latestStart())
        ? fault(
            FaultKind.STARTED_TOO_LATE,
            "grant %d had to begin within %s of heartbeat %d"
                .formatted(grant.number(), grant.latestStart(), grant.heartbeat()))
        : Optional.empty();
  }

  private Optional<Fault> leaseOver(Grant grant) {
    OptionalLong last = heartbeats.last();
    return last.isEmpty() || overdue(last.getAsLong(), grant.lease())
        ? fault(FaultKind.LEASE_ENDED, "no heartbeat came within " + grant.lease())
        : Optional.empty();
  }

  private boolean overdue(long fromNanos, Duration limit) {
    return hardware.time().elapsedNanos() - fromNanos > limit.toNanos();
  }

  private static Optional<Fault> disagree(String why) {
    return fault(FaultKind.READINGS_DISAGREE, why);
  }

  private static Optional<Fault> fault(FaultKind kind, String why) {
    return Optional.of(new Fault(kind, why));
  }
}
