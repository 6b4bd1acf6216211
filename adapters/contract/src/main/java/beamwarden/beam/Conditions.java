package beamwarden.beam;

/**
 * Everything an instrument is brought to before an exposure, the stage's position apart.
 *
 * @param beam what the column is set to
 * @param mode which detector path is in use
 * @param filter the filter's name in the instrument profile, or {@link #PANCHROMATIC}
 */
public record Conditions(BeamSettings beam, Mode mode, String filter) {
  /** The name that stands for no filter at all. */
  public static final String PANCHROMATIC = "panchromatic";
}
