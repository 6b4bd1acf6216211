package beamwarden.beam;

/** Where on a sample a job wants to look, in the sample's own plane. */
public sealed interface Region permits Rectangle, Mosaic, Line, Points {}
