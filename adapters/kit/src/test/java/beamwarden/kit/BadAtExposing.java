package beamwarden.kit;

import beamwarden.instrument.CurrentReading;
import beamwarden.instrument.DataFile;
import beamwarden.instrument.Fault;
import beamwarden.instrument.Grant;
import beamwarden.instrument.Receipt;
import beamwarden.instrument.StopWhen;
import java.time.Duration;
import java.util.List;
import java.util.Optional;
import java.util.OptionalLong;

/** Adapters that are honest but for one thing in what they expose, and what they report of it. */
final class BadAtExposing {
  private static final Duration A_WHILE = Duration.ofMillis(100);

  private BadAtExposing() {}

  static PlainInstrument hasNoLease(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      boolean leaseEnded(Grant grant) {
        return false;
      }
    };
  }

  static PlainInstrument exposesTwice(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      boolean knows(Grant grant) {
        return false;
      }
    };
  }

  static PlainInstrument ignoresTheStop(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      public void stop(StopWhen when) {}
    };
  }

  static PlainInstrument reportsLessTime(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      Receipt receipt(Grant grant, Duration beamOn, Optional<Fault> fault) {
        Receipt honest = super.receipt(grant, beamOn, fault);
        Duration less = beamOn.multipliedBy(9).dividedBy(10);
        return changed(honest, honest.unitsTouched(), less, honest.highestCurrent());
      }
    };
  }

  static PlainInstrument reportsFewerUnits(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      Receipt receipt(Grant grant, Duration beamOn, Optional<Fault> fault) {
        Receipt honest = super.receipt(grant, beamOn, fault);
        return changed(honest, honest.unitsDone(), honest.beamOn(), honest.highestCurrent());
      }
    };
  }

  static PlainInstrument reportsLessCurrent(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      Receipt receipt(Grant grant, Duration beamOn, Optional<Fault> fault) {
        Receipt honest = super.receipt(grant, beamOn, fault);
        Optional<CurrentReading> less =
            honest
                .highestCurrent()
                .map(high -> new CurrentReading(high.settings(), high.current().times(0.9)));
        return changed(honest, honest.unitsTouched(), honest.beamOn(), less);
      }
    };
  }

  private static Receipt changed(
      Receipt honest, long touched, Duration beamOn, Optional<CurrentReading> highest) {
    return new Receipt(
        honest.grant(),
        honest.fence(),
        honest.unitsDone(),
        touched,
        beamOn,
        honest.lowestCurrent(),
        highest,
        honest.counts(),
        honest.files(),
        honest.fault());
  }

  static PlainInstrument letsStrayBeamThrough(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      void end(Optional<Fault> fault) {
        running.ifPresent(grant -> hardware.strayBeam(OptionalLong.empty(), Duration.ofMillis(1)));
        super.end(fault);
      }
    };
  }

  static PlainInstrument exposesTwiceInSilence(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      void end(Optional<Fault> fault) {
        Duration again = hardware.sinceUnblanked();
        running.ifPresent(grant -> hardware.strayBeam(OptionalLong.of(grant.number()), again));
        super.end(fault);
      }
    };
  }

  static PlainInstrument takesTheLastFirst(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      void startNext() {
        if (!waiting.isEmpty()) {
          waiting.addFirst(waiting.pollLast());
        }
        super.startNext();
      }
    };
  }

  static PlainInstrument notesAfterwards(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      void noteBegun(Grant grant) {}

      @Override
      void keep(Grant grant, Receipt receipt) {
        super.noteBegun(grant);
        super.keep(grant, receipt);
      }

      @Override
      boolean knows(Grant grant) {
        return super.knows(grant) || running.equals(Optional.of(grant));
      }
    };
  }

  static PlainInstrument ignoresTheGrantsTime(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      Duration mostBeamOn(Grant grant) {
        return grant.exposure().scan().duration();
      }
    };
  }

  static PlainInstrument blanksTooLate(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      Duration mostBeamOn(Grant grant) {
        Duration honest = super.mostBeamOn(grant);
        boolean cut = honest.equals(grant.longestBeamOn());
        return cut ? honest.plusMillis(1) : honest;
      }
    };
  }

  static PlainInstrument ignoresTheCurrent(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      boolean tooHigh(Grant grant) {
        return false;
      }
    };
  }

  static PlainInstrument startsWhatWaitedForAStop(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      public void stop(StopWhen when) {
        List<Grant> kept = List.copyOf(waiting);
        waiting.clear();
        super.stop(when);
        waiting.addAll(kept);
      }
    };
  }

  static PlainInstrument stopsInTheMiddleOfALine(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      Duration toTheEnd(StopWhen when) {
        return Duration.ZERO;
      }
    };
  }

  static PlainInstrument doesNotRenewTheLease(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      boolean leaseEnded(Grant grant) {
        return hardware.sinceUnblanked().compareTo(grant.lease()) >= 0;
      }
    };
  }

  static PlainInstrument writesItsDataLate(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      DataFile write(Grant grant) {
        time.after(A_WHILE, () -> super.write(grant));
        return new DataFile("/no/such/folder/1.txt", "text/plain", 1, "00");
      }
    };
  }
}
