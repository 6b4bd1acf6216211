package beamwarden.kit;

import beamwarden.beam.Conditions;
import beamwarden.beam.Point;
import beamwarden.instrument.Grant;
import beamwarden.instrument.GrantFate;
import java.time.Duration;
import java.util.HashSet;
import java.util.List;
import java.util.OptionalLong;
import java.util.Set;

/** Adapters that are honest but for one thing in what they accept, forbid, keep and answer. */
final class BadAtAnswering {
  private static final Duration A_WHILE = Duration.ofMillis(100);
  private static int processes;

  private BadAtAnswering() {}

  static PlainInstrument startsASealedGrantLate(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      public void seal(long fence, String store, Set<Long> grants, boolean handOver) {
        List<Grant> kept = List.copyOf(waiting);
        waiting.clear();
        super.seal(fence, store, grants, handOver);
        kept.forEach(grant -> later(A_WHILE, () -> start(grant)));
      }
    };
  }

  static PlainInstrument saysNeverBegunForUnknown(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      GrantFate unknown() {
        return new GrantFate.NeverBegun();
      }
    };
  }

  static PlainInstrument looksAtTheLatestStartTooEarly(PlainRig rig) {
    Set<Grant> seenInTime = new HashSet<>();
    return new PlainInstrument(rig) {
      @Override
      public void begin(Grant grant) {
        if (super.inTime(grant)) {
          seenInTime.add(grant);
        }
        super.begin(grant);
      }

      @Override
      boolean inTime(Grant grant) {
        return seenInTime.contains(grant);
      }
    };
  }

  static PlainInstrument ignoresTheLatestStart(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      boolean inTime(Grant grant) {
        return true;
      }
    };
  }

  static PlainInstrument startsUnsealed(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      boolean sealed() {
        return true;
      }
    };
  }

  static PlainInstrument ignoresTheFence(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      boolean ofFence(Grant grant) {
        return true;
      }
    };
  }

  static PlainInstrument ignoresTheStore(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      boolean ofStore(Grant grant) {
        return true;
      }
    };
  }

  static PlainInstrument ignoresTheSession(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      boolean ofSession(Grant grant) {
        return true;
      }
    };
  }

  static PlainInstrument answersASealBeforeItBlanks(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      void endForSeal() {
        running.ifPresent(grant -> later(A_WHILE, super::endForSeal));
      }
    };
  }

  static PlainInstrument isSealedByAnybody(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      boolean maySeal(long fence, String store, boolean handOver) {
        return true;
      }
    };
  }

  static PlainInstrument tellsOneStoreOfAnother(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      String key(long grant) {
        return PlainNotes.key(Trial.STORE, grant);
      }
    };
  }

  static PlainInstrument forgetsItsFenceWithItsProcess(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      void die() {
        notes.fence = 0;
        super.die();
      }
    };
  }

  static PlainInstrument forgetsReceiptsWithItsProcess(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      void die() {
        notes.receipts.clear();
        super.die();
      }
    };
  }

  static PlainInstrument preparesWithTheBeamOn(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      public void prepare(long request, Conditions conditions, Point stage) {
        super.prepare(request, conditions, stage);
        hardware.strayBeam(OptionalLong.empty(), Duration.ofMillis(1));
      }
    };
  }

  static PlainInstrument echoesWhatItIsAsked(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      boolean reaches(Conditions conditions) {
        return true;
      }
    };
  }

  static PlainInstrument leavesTheBeamOnWhenClosed(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      void endForClose() {}
    };
  }

  static PlainInstrument takesItsProcessForTheSession(PlainRig rig) {
    String mine = "process-" + ++processes;
    return new PlainInstrument(rig) {
      @Override
      String session() {
        return mine;
      }
    };
  }

  static PlainInstrument doesNotSeeTheDoor(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      String session() {
        return "always";
      }
    };
  }

  static PlainInstrument leavesTheValveOpen(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      void closeValve() {}
    };
  }

  static PlainInstrument windsDownWithTheBeamOn(PlainRig rig) {
    return new PlainInstrument(rig) {
      @Override
      void endForWindDown() {
        later(A_WHILE, super::endForWindDown);
      }
    };
  }
}
