package beamwarden.document;

import java.time.Duration;

/** How large a document and the numbers in it may be; more ends in a problem, never in a fall. */
final class Limits {
  /** The size of a document in bytes, about three thousand jobs. */
  static final int BYTES = 1 << 20;

  /** Groups and lists within each other. */
  static final int NESTING = 16;

  /** Values, keys, lists and groups; what an alias stands for counts each time. */
  static final int NODES = 100_000;

  /** Aliases. */
  static final int ALIASES = 100;

  /** Problems that are listed. */
  static final int PROBLEMS = 200;

  /** Characters of a foreign text that a problem repeats. */
  static final int QUOTED_CHARACTERS = 60;

  /** Characters of an id, a name of an area or of a filter. */
  static final int ID_CHARACTERS = 64;

  /** Characters of a label, a reason or an option. */
  static final int TEXT_CHARACTERS = 500;

  /** Pixels along one side of a raster. */
  static final int PIXELS = 32_768;

  /** Passes of a job: tiles times frames times filters, or points. */
  static final int PASSES = 10_000;

  /** The beam-on time of a job. */
  static final Duration BEAM_ON = Duration.ofDays(31);

  /** Frames of a job. */
  static final int FRAMES = 10_000;

  /** Tiles along one side of a mosaic. */
  static final int TILES = 100;

  /** Coincidences that a job may wait for. */
  static final long COINCIDENCES = 1_000_000_000_000L;

  /** Rules for shifts in a profile. */
  static final int SHIFTS = 400;

  /** Retries of one exposure. */
  static final int RETRIES = 10;

  /** The years of any date in a document. */
  static final int FIRST_YEAR = 2000;

  /** The years of any date in a document. */
  static final int LAST_YEAR = 2199;

  /** Any time in a document. */
  static final Duration TIME = Duration.ofDays(366);

  private Limits() {}
}
