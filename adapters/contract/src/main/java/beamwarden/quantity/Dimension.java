package beamwarden.quantity;

/** What kind of quantity is meant, each counted in one unit. */
public enum Dimension {
  /** In metres. */
  LENGTH("length", "a", "400 um"),
  /** In seconds. */
  TIME("time", "a", "40 us"),
  /** In amperes. */
  CURRENT("current", "a", "500 pA"),
  /** In volts. */
  VOLTAGE("voltage", "a", "10 kV"),
  /** In coulombs. */
  CHARGE("charge", "a", "40 uC"),
  /** In electrons per square nanometre. */
  FLUENCE("fluence", "a", "60 e/nm2"),
  /** In grays. */
  ABSORBED_DOSE("absorbed dose", "an", "2 MGy"),
  /** In grams per cubic centimetre. */
  DENSITY("density", "a", "2.65 g/cm3"),
  /** In degrees. */
  ANGLE("angle", "an", "15 deg"),
  /** A pure number; a percentage is a hundredth. */
  RATIO("percentage", "a", "10 %"),
  /** In metres per second. */
  SPEED("speed", "a", "1 mm/s"),
  /** In metres per second squared. */
  ACCELERATION("acceleration", "an", "10 mm/s2"),
  /** In hertz. */
  FREQUENCY("frequency", "a", "2 MHz"),
  /** In lines per metre, of a grating. */
  LINE_DENSITY("line density", "a", "150 /mm");

  private final String noun;
  private final String article;
  private final String example;

  Dimension(String noun, String article, String example) {
    this.noun = noun;
    this.article = article;
    this.example = example;
  }

  /** What a person calls it, such as {@code absorbed dose}. */
  public String noun() {
    return noun;
  }

  /** What a person calls it, with its article, such as {@code an absorbed dose}. */
  public String withArticle() {
    return article + " " + noun;
  }

  /** How one is written, such as {@code 2 MGy}. */
  public String example() {
    return example;
  }
}
