package beamwarden.simulated;

import java.util.SplittableRandom;

/** Random numbers that depend on a seed and on what they are for, and on nothing else. */
final class Seeds {
  private static final long GOLDEN = 0x9E3779B97F4A7C15L;

  private Seeds() {}

  /** The generator for one purpose; the same words give the same numbers. */
  static SplittableRandom random(long seed, Object... purpose) {
    return new SplittableRandom(hash(seed, purpose));
  }

  /** A number that looks random and depends on the words alone: texts and whole numbers. */
  static long hash(long seed, Object... purpose) {
    long hash = mixed(seed);
    for (Object word : purpose) {
      hash =
          mixed(
              hash
                  + (word instanceof Number number
                      ? number.longValue()
                      : word.toString().hashCode()));
    }
    return hash;
  }

  /** One step of the mixing function of SplitMix64 (Steele, Lea and Flood, 2014). */
  static long mixed(long value) {
    long z = value + GOLDEN;
    z = (z ^ (z >>> 30)) * 0xBF58476D1CE4E5B9L;
    z = (z ^ (z >>> 27)) * 0x94D049BB133111EBL;
    return z ^ (z >>> 31);
  }

  /** A number from 0 to below 1 from such a hash. */
  static double share(long hash) {
    return (hash >>> 11) * 0x1.0p-53;
  }
}
