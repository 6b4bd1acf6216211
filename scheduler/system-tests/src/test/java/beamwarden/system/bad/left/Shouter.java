package beamwarden.system.bad.left;

/** Writes to the standard streams. */
final class Shouter {
  private Shouter() {}

  static void shout(RuntimeException failure) {
    System.out.println("out");
    System.err.println("err");
    failure.printStackTrace();
  }
}
