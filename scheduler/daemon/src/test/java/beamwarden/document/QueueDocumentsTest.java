package beamwarden.document;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.beam.BeamSettings;
import beamwarden.beam.Conditions;
import beamwarden.beam.Mode;
import beamwarden.beam.Mosaic;
import beamwarden.beam.Placement;
import beamwarden.beam.Point;
import beamwarden.beam.Points;
import beamwarden.beam.Rectangle;
import beamwarden.quantity.Charge;
import beamwarden.quantity.Current;
import beamwarden.quantity.Fluence;
import beamwarden.quantity.Length;
import beamwarden.quantity.Voltage;
import beamwarden.queue.Acquisition;
import beamwarden.queue.Area;
import beamwarden.queue.AtCap;
import beamwarden.queue.Averaging.OverGeneration;
import beamwarden.queue.Averaging.OverLength;
import beamwarden.queue.Averaging.OverProbe;
import beamwarden.queue.Cap.OnCharge;
import beamwarden.queue.Cap.OnFluence;
import beamwarden.queue.Job;
import beamwarden.queue.Material;
import beamwarden.queue.Queue;
import beamwarden.queue.Sample;
import java.time.Duration;
import java.time.Instant;
import java.util.List;
import java.util.Optional;
import java.util.OptionalLong;
import org.junit.jupiter.api.Test;

class QueueDocumentsTest {
  private static final Queue QUEUE = Samples.queue(Samples.QUEUE).value().orElseThrow();

  @Test
  void readsAQueueThatUsesNearlyEverythingWithoutProblems() {
    assertEquals(List.of(), Samples.problems(Samples.queue(Samples.QUEUE)));
    assertEquals("whole", QUEUE.name());
  }

  @Test
  void readsASampleWithItsAreas() {
    Sample sample = QUEUE.samples().get(0);
    assertEquals("lim-02", sample.id());
    assertEquals("limestone, polished", sample.label());
    assertEquals(Optional.of(new Material("CaCO3", 2.71)), sample.material());
    assertEquals(new Placement(new Point(0.0124, -0.0031), 12, 3e-6), sample.placement());
    assertEquals(
        List.of(
            new Area(
                "kept", Rectangle.of(new Point(600e-6, 400e-6), 60e-6, 40e-6), Area.Use.KEEP_OUT),
            new Area(
                "spent",
                new Rectangle(new Point(0, 300e-6), 30e-6, 17e-6, 5),
                Area.Use.SACRIFICIAL),
            new Area(
                "grain", Rectangle.of(new Point(120e-6, -40e-6), 60e-6, 60e-6), Area.Use.CAPPED)),
        sample.areas());
  }

  @Test
  void readsEveryKindOfCap() {
    List<?> caps = QUEUE.samples().get(0).caps();
    assertEquals(
        new OnFluence(new Fluence(900), new OverGeneration(), Optional.empty(), "calcite darkens"),
        caps.get(0));
    assertEquals(
        new OnFluence(
            new Fluence(80), new OverLength(new Length(200e-9)), Optional.of("grain"), ""),
        caps.get(1));
    assertTrue(((OnFluence) caps.get(2)).averaging() instanceof OverProbe);
    assertEquals(5, ((OnFluence) caps.get(2)).limit().coulombsPerSquareMetre(), 1e-12);
    assertEquals(new OnCharge(new Charge(2.5e-6), Optional.of("spent"), ""), caps.get(3));
  }

  @Test
  void givesASampleWithoutALabelItsId() {
    Sample bare = QUEUE.samples().get(1);
    assertEquals("bare", bare.label());
    assertEquals(Optional.empty(), bare.material());
  }

  @Test
  void completesAJobByItsRecipe() {
    Job survey = QUEUE.jobs().get(0);
    assertEquals(
        new Acquisition.Raster(
            Mode.INTENSITY_MAP, 1500, 1000, Duration.ofNanos(25_000), List.of("violet", "red"), 1),
        survey.acquisition());
    assertEquals(new BeamSettings(new Voltage(8000), new Current(350e-12)), survey.beam());
    assertEquals(new Rectangle(new Point(0, 0), 300e-6, 200e-6, 20), survey.region());
    assertEquals(7, survey.priority());
    assertEquals(AtCap.TRIM, survey.atCap());
  }

  /** Ljubljana is an hour ahead of UTC on 16 March: the IANA time zone database. */
  @Test
  void takesATimeWithoutOffsetAsTheLabsOwn() {
    Job survey = QUEUE.jobs().get(0);
    assertEquals(Optional.of(Instant.parse("2031-03-16T16:00:00Z")), survey.earliest());
    assertEquals(Optional.of(Instant.parse("2031-03-17T06:00:00Z")), survey.deadline());
  }

  @Test
  void letsAJobOverrideItsRecipe() {
    Job mosaic = QUEUE.jobs().get(1);
    Acquisition.Raster raster = (Acquisition.Raster) mosaic.acquisition();
    assertEquals(Duration.ofNanos(8000), raster.dwell());
    assertEquals(2, raster.frames());
    assertEquals(new Mosaic(3, 2, 300e-6, 300e-6, 0.06, new Point(0.4e-3, 0), 0), mosaic.region());
    assertEquals(List.of("survey"), mosaic.after());
    assertEquals(Job.USUAL_PRIORITY, mosaic.priority());
    assertEquals(AtCap.REFUSE, mosaic.atCap());
  }

  @Test
  void givesAnElectronImageOnePassOfNoFilter() {
    Acquisition.Raster image = (Acquisition.Raster) QUEUE.jobs().get(2).acquisition();
    assertEquals(List.of(Conditions.PANCHROMATIC), image.filters());
    assertEquals(1, image.frames());
  }

  @Test
  void readsACountAtPoints() {
    Job pairs = QUEUE.jobs().get(3);
    assertEquals(
        new Acquisition.Spot(Mode.PHOTON_CORRELATION, Duration.ofHours(3), OptionalLong.of(20_000)),
        pairs.acquisition());
    assertEquals(
        new Points(List.of(new Point(0, 300e-6), new Point(4e-6, 301e-6))), pairs.region());
    assertEquals(AtCap.ASK, pairs.atCap());
  }

  @Test
  void warnsOfAnElectronImageBesideAMapAndReadsTheQueue() {
    Reading<Queue> reading =
        Samples.queue(Samples.QUEUE.replace("filters: [violet, red]", "also: [electron-image]"));
    assertEquals(
        List.of(
            "20:87: warning: the electron image beside a map is not recorded by this version;"
                + " leave also out, or write a job of mode electron-image, which costs dose"),
        Samples.problems(reading));
    assertTrue(reading.value().isPresent());
  }

  @Test
  void warnsOfASampleThatNothingLimits() {
    Reading<Queue> reading =
        Samples.queue(
            Samples.QUEUE.replace("caps: [{ fluence: 60 e/nm2, over: 0.2 um }]", "caps: []"));
    assertEquals(
        List.of(
            "18:11: warning: nothing limits what this sample may receive; write for example caps:"
                + " [{ fluence: 9000 e/nm2 }, { charge: 40 uC }]"),
        Samples.problems(reading));
    assertTrue(reading.value().isPresent());
  }

  @Test
  void warnsOfARecipeThatNoJobUses() {
    String text = Samples.QUEUE.replace("recipes:", "recipes:\n  idle: { voltage: 8 kV }");
    assertEquals(
        List.of(
            "20:3: warning: no job builds on the recipe idle; leave it out, or name it in a job"),
        Samples.problems(Samples.queue(text)));
  }
}
