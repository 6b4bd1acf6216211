package beamwarden.instrument;

/**
 * A data file that an adapter has written and forced to disk.
 *
 * @param path where it lies
 * @param type its media type
 * @param bytes its size
 * @param sha256 its SHA-256 in lower-case hexadecimal
 */
public record DataFile(String path, String type, long bytes, String sha256) {}
