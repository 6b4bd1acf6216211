package beamwarden.system.bad.left;

/** Throws what nobody can catch with a purpose. */
final class Thrower {
  private Thrower() {}

  static void exception(boolean wrong) throws Exception {
    if (wrong) {
      throw new Exception("anything");
    }
  }

  static void runtimeException(boolean wrong) {
    if (wrong) {
      throw new RuntimeException("anything");
    }
  }

  static void throwable(boolean wrong) throws Throwable {
    if (wrong) {
      throw new Throwable("anything");
    }
  }

  static void error(boolean wrong) {
    if (wrong) {
      throw new Error("anything");
    }
  }

  /** An exception of its own: no breach, though it calls a generic constructor. */
  static final class Particular extends RuntimeException {
    private static final long serialVersionUID = 1L;

    Particular() {
      super("something");
    }
  }
}
