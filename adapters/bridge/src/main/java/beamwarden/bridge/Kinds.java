package beamwarden.bridge;

import beamwarden.beam.Line;
import beamwarden.beam.Mosaic;
import beamwarden.beam.Points;
import beamwarden.beam.RasterScan;
import beamwarden.beam.Rectangle;
import beamwarden.beam.SpotScan;
import beamwarden.instrument.GrantFate;
import beamwarden.instrument.InstrumentEvent;
import com.fasterxml.jackson.annotation.JsonSubTypes;
import com.fasterxml.jackson.annotation.JsonTypeInfo;

/**
 * How JSON says which kind a value of a closed set is: written out, so that no renaming moves it.
 */
final class Kinds {
  private Kinds() {}

  @JsonTypeInfo(use = JsonTypeInfo.Id.NAME, property = "scan")
  @JsonSubTypes({
    @JsonSubTypes.Type(value = RasterScan.class, name = "raster"),
    @JsonSubTypes.Type(value = SpotScan.class, name = "spot")
  })
  interface OfScan {}

  @JsonTypeInfo(use = JsonTypeInfo.Id.NAME, property = "region")
  @JsonSubTypes({
    @JsonSubTypes.Type(value = Rectangle.class, name = "rectangle"),
    @JsonSubTypes.Type(value = Mosaic.class, name = "mosaic"),
    @JsonSubTypes.Type(value = Line.class, name = "line"),
    @JsonSubTypes.Type(value = Points.class, name = "points")
  })
  interface OfRegion {}

  /** For a type that also stands alone, where its kind is known and need not be said. */
  @JsonTypeInfo(use = JsonTypeInfo.Id.NONE)
  interface Known {}

  @JsonTypeInfo(use = JsonTypeInfo.Id.NAME, property = "fate")
  @JsonSubTypes({
    @JsonSubTypes.Type(value = GrantFate.NeverBegun.class, name = "never-begun"),
    @JsonSubTypes.Type(value = GrantFate.Reported.class, name = "reported"),
    @JsonSubTypes.Type(value = GrantFate.Unknown.class, name = "unknown")
  })
  interface OfFate {}

  @JsonTypeInfo(use = JsonTypeInfo.Id.NAME, property = "event")
  @JsonSubTypes({
    @JsonSubTypes.Type(value = InstrumentEvent.Connected.class, name = "connected"),
    @JsonSubTypes.Type(value = InstrumentEvent.Lost.class, name = "lost"),
    @JsonSubTypes.Type(value = InstrumentEvent.Sealed.class, name = "sealed"),
    @JsonSubTypes.Type(value = InstrumentEvent.SealRefused.class, name = "seal-refused"),
    @JsonSubTypes.Type(value = InstrumentEvent.Prepared.class, name = "prepared"),
    @JsonSubTypes.Type(value = InstrumentEvent.NotPrepared.class, name = "not-prepared"),
    @JsonSubTypes.Type(value = InstrumentEvent.Measured.class, name = "measured"),
    @JsonSubTypes.Type(value = InstrumentEvent.NotMeasured.class, name = "not-measured"),
    @JsonSubTypes.Type(value = InstrumentEvent.Begun.class, name = "begun"),
    @JsonSubTypes.Type(value = InstrumentEvent.NotBegun.class, name = "not-begun"),
    @JsonSubTypes.Type(value = InstrumentEvent.Progress.class, name = "progress"),
    @JsonSubTypes.Type(value = InstrumentEvent.Ended.class, name = "ended"),
    @JsonSubTypes.Type(value = InstrumentEvent.HeartbeatSeen.class, name = "heartbeat-seen"),
    @JsonSubTypes.Type(value = InstrumentEvent.WoundDown.class, name = "wound-down"),
    @JsonSubTypes.Type(value = InstrumentEvent.Trouble.class, name = "trouble")
  })
  interface OfEvent {}
}
