package beamwarden.kit;

import beamwarden.timing.Timeline;
import beamwarden.timing.VirtualTime;
import java.time.Duration;
import java.time.Instant;
import java.util.function.BooleanSupplier;

/** Virtual time, moved from task to task. */
record MovedTime(VirtualTime line) implements Passage {
  @Override
  public Instant now() {
    return line.instant();
  }

  @Override
  public boolean until(BooleanSupplier isSo, Duration atMost) {
    boolean[] over = {false};
    Timeline.Waiting end = line.after(atMost, () -> over[0] = true);
    while (!isSo.getAsBoolean()) {
      if (over[0]) {
        return false;
      }
      line.runNext();
    }
    end.cancel();
    return true;
  }
}
