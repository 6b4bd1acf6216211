package beamwarden.simulated;

import java.time.Duration;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import java.util.stream.Collectors;

/**
 * Faults from a script such as {@code detector-timeout@grant:3, door-opened@time:36000s}.
 *
 * <p>{@code grant:N} is the middle of the N-th exposure, counted over the instrument's whole life;
 * {@code time:Ns} is N seconds after the instrument was first opened.
 */
final class ScriptedFaults implements FaultPlan {
  private static final Pattern ENTRY =
      Pattern.compile("([a-z-]+)@(?:grant:([1-9][0-9]{0,8})|time:([0-9]{1,9})s)");
  private static final double MIDDLE = 0.5;

  private final Map<Long, Mishap> byGrant = new HashMap<>();
  private final List<Timed> timed = new ArrayList<>();

  /**
   * Reads a script; an empty one holds no faults.
   *
   * @throws IllegalArgumentException when it cannot be read
   */
  ScriptedFaults(String script) {
    for (String entry : script.split(",", -1)) {
      if (!entry.isBlank()) {
        add(entry.strip());
      }
    }
  }

  private void add(String entry) {
    Matcher parts = ENTRY.matcher(entry);
    if (!parts.matches()) {
      throw new IllegalArgumentException(
          "the fault '"
              + entry
              + "' cannot be read: write a fault, then @grant:3 or @time:36000s, such as"
              + " detector-timeout@grant:3");
    }
    Mishap mishap = Mishap.named(parts.group(1)).orElseThrow(() -> unknown(parts.group(1)));
    if (parts.group(2) != null) {
      byGrant.put(Long.parseLong(parts.group(2)), mishap);
    } else {
      timed.add(new Timed(Duration.ofSeconds(Long.parseLong(parts.group(3))), mishap));
    }
  }

  @Override
  public Optional<Strike> at(Step step, long exposed) {
    return step == Step.MID_EXPOSURE
        ? Optional.ofNullable(byGrant.get(exposed)).map(mishap -> new Strike(mishap, MIDDLE))
        : Optional.empty();
  }

  @Override
  public List<Timed> timed() {
    return List.copyOf(timed);
  }

  private static IllegalArgumentException unknown(String name) {
    String known =
        Arrays.stream(Mishap.values()).map(Mishap::text).collect(Collectors.joining(", "));
    return new IllegalArgumentException("there is no fault '" + name + "': choose one of " + known);
  }
}
