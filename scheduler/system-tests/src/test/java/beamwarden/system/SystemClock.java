package beamwarden.system;

import com.tngtech.archunit.base.DescribedPredicate;
import com.tngtech.archunit.core.domain.JavaAccess;
import com.tngtech.archunit.core.domain.JavaConstructorCall;
import java.util.Set;

/** Knows every way to read the machine's clock, calls and method references alike. */
final class SystemClock {
  static final DescribedPredicate<JavaAccess<?>> READS =
      DescribedPredicate.describe("reads the system clock", SystemClock::isRead);

  private static final Set<String> OF_SYSTEM = Set.of("currentTimeMillis", "nanoTime");

  private static final Set<String> OF_CLOCK =
      Set.of(
          "system", "systemUTC", "systemDefaultZone", "tickMillis", "tickSeconds", "tickMinutes");

  private SystemClock() {}

  private static boolean isRead(JavaAccess<?> access) {
    String owner = access.getTargetOwner().getName();
    String name = access.getTarget().getName();
    return switch (owner) {
      case "java.lang.System" -> OF_SYSTEM.contains(name);
      case "java.time.Clock" -> OF_CLOCK.contains(name);
      case "java.time.InstantSource" -> name.equals("system");
      case "java.util.Calendar" -> name.equals("getInstance");
      case "java.util.Date" -> access instanceof JavaConstructorCall call && takesNothing(call);
      default -> owner.startsWith("java.time.") && name.equals("now") && !takesAClock(access);
    };
  }

  private static boolean takesNothing(JavaConstructorCall call) {
    return call.getTarget().getRawParameterTypes().isEmpty();
  }

  private static boolean takesAClock(JavaAccess<?> access) {
    return access.getTarget().getFullName().contains("(java.time.Clock)");
  }
}
