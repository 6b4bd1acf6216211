package beamwarden.kit;

import beamwarden.instrument.Fault;
import beamwarden.instrument.Grant;
import beamwarden.instrument.GrantFate;
import beamwarden.instrument.Receipt;
import beamwarden.instrument.StopWhen;
import java.time.Duration;
import java.util.List;
import java.util.Optional;
import java.util.Set;

/** Adapters that are honest but for one thing. */
final class BadInstruments {
  private BadInstruments() {}

  /** Goes on without a heartbeat. */
  static final class NoLease extends PlainInstrument {
    NoLease(PlainRig rig) {
      super(rig);
    }

    @Override
    boolean leaseEnded(Grant grant) {
      return false;
    }
  }

  /** Answers a seal, and some time later starts what it had been given before. */
  static final class StartsSealedGrantLate extends PlainInstrument {
    StartsSealedGrantLate(PlainRig rig) {
      super(rig);
    }

    @Override
    public void seal(long fence, String store, Set<Long> grants, boolean handOver) {
      List<Grant> kept = List.copyOf(waiting);
      waiting.clear();
      super.seal(fence, store, grants, handOver);
      kept.forEach(grant -> later(Duration.ofMillis(100), () -> start(grant)));
    }
  }

  /** Takes a grant that is sent again for a new one. */
  static final class ExposesTwice extends PlainInstrument {
    ExposesTwice(PlainRig rig) {
      super(rig);
    }

    @Override
    boolean knows(Grant grant) {
      return false;
    }
  }

  /** Takes what it does not know for nothing. */
  static final class SaysZeroForUnknown extends PlainInstrument {
    SaysZeroForUnknown(PlainRig rig) {
      super(rig);
    }

    @Override
    GrantFate unknown() {
      return new GrantFate.NeverBegun();
    }
  }

  /** Has no ear for a stop. */
  static final class IgnoresTheStop extends PlainInstrument {
    IgnoresTheStop(PlainRig rig) {
      super(rig);
    }

    @Override
    public void stop(StopWhen when) {}
  }

  /** Reports nine tenths of the time. */
  static final class SmallReceipt extends PlainInstrument {
    SmallReceipt(PlainRig rig) {
      super(rig);
    }

    @Override
    Receipt receipt(Grant grant, Duration beamOn, Optional<Fault> fault) {
      Receipt honest = super.receipt(grant, beamOn, fault);
      return new Receipt(
          honest.grant(),
          honest.fence(),
          honest.unitsDone(),
          honest.unitsTouched(),
          beamOn.multipliedBy(9).dividedBy(10),
          honest.lowestCurrent(),
          honest.highestCurrent(),
          honest.counts(),
          honest.files(),
          honest.fault());
    }
  }
}
