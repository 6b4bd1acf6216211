package beamwarden.bridge;

import beamwarden.beam.BeamSettings;
import beamwarden.beam.Conditions;
import beamwarden.beam.Exposure;
import beamwarden.beam.Mode;
import beamwarden.beam.Placement;
import beamwarden.beam.Point;
import beamwarden.beam.RasterScan;
import beamwarden.beam.Rectangle;
import beamwarden.beam.Scan;
import beamwarden.beam.SpotScan;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.Blanker;
import beamwarden.instrument.Column;
import beamwarden.instrument.CurrentMeter;
import beamwarden.instrument.CurrentReading;
import beamwarden.instrument.DataFile;
import beamwarden.instrument.Fault;
import beamwarden.instrument.FaultKind;
import beamwarden.instrument.Field;
import beamwarden.instrument.Filter;
import beamwarden.instrument.Grant;
import beamwarden.instrument.GrantFate;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.ModeAbility;
import beamwarden.instrument.Probe;
import beamwarden.instrument.Readings;
import beamwarden.instrument.Receipt;
import beamwarden.instrument.SealReport;
import beamwarden.instrument.Stage;
import beamwarden.instrument.StopWhen;
import beamwarden.quantity.Current;
import beamwarden.quantity.Length;
import beamwarden.quantity.Voltage;
import java.time.Duration;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalInt;
import java.util.OptionalLong;

/** One of each message, with figures that belong together. */
final class Examples {
  static final String STORE = "5f0c1d2e";
  static final String SESSION = "chamber-41";
  static final Point STAGE = new Point(0.0124, -0.0031);
  static final BeamSettings BEAM = new BeamSettings(new Voltage(8000), new Current(350e-12));
  static final Conditions VIOLET = new Conditions(BEAM, Mode.INTENSITY_MAP, "violet");
  static final Conditions COUNTING =
      new Conditions(
          new BeamSettings(new Voltage(5000), new Current(15e-12)),
          Mode.PHOTON_CORRELATION,
          Conditions.PANCHROMATIC);
  static final CurrentReading READING = new CurrentReading(BEAM, new Current(3.52e-10));
  static final Placement PLACEMENT = new Placement(STAGE, 0, 3e-6);
  static final Abilities ABILITIES =
      new Abilities(
          "north-room",
          new Stage(-0.025, 0.025, -0.025, 0.025, 0.001, 0.01, Duration.ofSeconds(2), 2e-6),
          new Field(5e-4, 0.02),
          new Column(
              new Voltage(1000),
              new Voltage(30_000),
              Duration.ofMinutes(12),
              new Current(2e-12),
              new Current(4e-8),
              Duration.ofMinutes(2)),
          new CurrentMeter(
              0.03, new Current(2e-13), 0.1, Duration.ofHours(1), Duration.ofSeconds(20)),
          new Blanker(Blanker.Kind.FAST, Optional.of(Duration.ofNanos(100_000))),
          Map.of(
              "violet", new Filter(new Length(380e-9), new Length(450e-9)),
              "green", new Filter(new Length(500e-9), new Length(560e-9))),
          Duration.ofSeconds(4),
          Map.of(
              Mode.INTENSITY_MAP,
              new ModeAbility(
                  Duration.ofNanos(200),
                  Duration.ofMillis(10),
                  OptionalDouble.of(3e-4),
                  Duration.ofNanos(50_000),
                  Duration.ofSeconds(1),
                  ModeAbility.Boundary.LINE),
              Mode.PHOTON_CORRELATION,
              new ModeAbility(
                  Duration.ofSeconds(1),
                  Duration.ofMinutes(5),
                  OptionalDouble.empty(),
                  Duration.ZERO,
                  Duration.ofSeconds(1),
                  ModeAbility.Boundary.SLICE)),
          List.of(new Probe(new Voltage(8000), new Current(350e-12), new Length(6e-9))));

  private static final Scan LINES =
      new RasterScan(
          Rectangle.of(new Point(0, 0), 3e-4, 3e-4),
          1500,
          1500,
          300,
          100,
          Duration.ofNanos(25_000),
          Duration.ofNanos(50_000));
  static final Grant GRANT =
      new Grant(
          17,
          STORE,
          4,
          SESSION,
          new Exposure("survey", 0, "sst-07", PLACEMENT, VIOLET, LINES),
          Duration.ofMillis(3751),
          new Current(3.99e-10),
          912,
          Duration.ofSeconds(20),
          Duration.ofSeconds(30),
          "9d1f0c");
  static final Grant SPOT_GRANT =
      new Grant(
          18,
          STORE,
          4,
          SESSION,
          new Exposure(
              "emitter-correlation",
              0,
              "abs-3",
              PLACEMENT,
              COUNTING,
              new SpotScan(new Point(0, 8e-6), Duration.ofSeconds(30))),
          Duration.ofMillis(30_001),
          new Current(1.8e-11),
          913,
          Duration.ofSeconds(20),
          Duration.ofSeconds(30),
          "77ab42");
  static final Receipt WHOLE =
      new Receipt(
          17,
          4,
          100,
          100,
          Duration.ofNanos(3_750_400_000L),
          Optional.of(READING),
          Optional.of(READING),
          Map.of("violet", 81_234L, "electron-image", 500_211L),
          List.of(new DataFile("data/17-violet.tif", "image/tiff", 300_122, "ab".repeat(32))),
          Optional.empty());
  static final Receipt CUT_SHORT =
      new Receipt(
          16,
          4,
          42,
          43,
          Duration.ofMillis(1590),
          Optional.empty(),
          Optional.of(READING),
          Map.of(),
          List.of(),
          Optional.of(fault(FaultKind.DETECTOR_TIMEOUT, "the camera did not answer for 5 s")));
  static final Readings IDLE = new Readings(true, true, false, Optional.empty(), STAGE);
  static final Readings SET = new Readings(true, false, true, Optional.of(VIOLET), STAGE);

  private Examples() {}

  static Fault fault(FaultKind kind, String message) {
    return new Fault(kind, message);
  }

  /** What a daemon asks, by the name of its golden file. */
  static Map<String, Call> calls() {
    Map<String, Call> calls = new LinkedHashMap<>();
    calls.put("hello", new Call.Hello(1, Optional.of("c0ffee")));
    calls.put("hello-over-streams", new Call.Hello(1, Optional.empty()));
    calls.put("connect", new Call.Connect());
    calls.put("seal", Call.Seal.of(4, STORE, List.of(17L, 16L, 15L), false));
    calls.put("prepare", new Call.Prepare(1, VIOLET, STAGE));
    calls.put("measure", new Call.Measure(2));
    calls.put("heartbeat", new Call.Heartbeat(912));
    calls.put("begin", new Call.Begin(GRANT));
    calls.put("begin-spot", new Call.Begin(SPOT_GRANT));
    calls.put("stop", new Call.Stop(StopWhen.AT_BOUNDARY));
    calls.put("stop-now", new Call.Stop(StopWhen.NOW));
    calls.put("acknowledge", new Call.Acknowledge(17));
    calls.put("wind-down", new Call.WindDown());
    calls.put("bye", new Call.Bye());
    return calls;
  }

  /** What an adapter tells, by the name of its golden file. */
  static Map<String, InstrumentEvent> events() {
    Map<String, InstrumentEvent> events = new LinkedHashMap<>();
    events.put("connected", new InstrumentEvent.Connected(ABILITIES, SESSION, IDLE));
    events.put("lost", new InstrumentEvent.Lost("the column's controller does not answer"));
    events.put(
        "sealed",
        new InstrumentEvent.Sealed(
            new SealReport(
                4,
                STORE,
                16,
                Map.of(
                    15L, new GrantFate.NeverBegun(),
                    16L, new GrantFate.Reported(CUT_SHORT),
                    17L, new GrantFate.Unknown()))));
    events.put("seal-refused", new InstrumentEvent.SealRefused(5, STORE));
    events.put("prepared", new InstrumentEvent.Prepared(1, VIOLET, STAGE));
    events.put(
        "not-prepared",
        new InstrumentEvent.NotPrepared(
            1, fault(FaultKind.REGION_UNREACHABLE, "the stage stops at 25 mm")));
    events.put("measured", new InstrumentEvent.Measured(2, READING));
    events.put(
        "not-measured",
        new InstrumentEvent.NotMeasured(
            2, fault(FaultKind.NOT_OFFERED, "the cup lies beyond sample sst-07")));
    events.put("begun", new InstrumentEvent.Begun(17));
    events.put(
        "not-begun",
        new InstrumentEvent.NotBegun(
            17, fault(FaultKind.STARTED_TOO_LATE, "the latest start has passed")));
    events.put("progress", new InstrumentEvent.Progress(17, 60));
    events.put("ended", new InstrumentEvent.Ended(WHOLE));
    events.put("ended-early", new InstrumentEvent.Ended(CUT_SHORT));
    events.put("heartbeat-seen", new InstrumentEvent.HeartbeatSeen(912));
    events.put("wound-down", new InstrumentEvent.WoundDown(IDLE));
    events.put(
        "trouble",
        new InstrumentEvent.Trouble(fault(FaultKind.VACUUM, "the chamber is above 1e-2 Pa")));
    return events;
  }

  /** One of each message, by the name of its golden file. */
  static Map<String, Message> messages() {
    Map<String, Message> messages = new LinkedHashMap<>();
    long id = 0;
    for (Map.Entry<String, Call> call : calls().entrySet()) {
      messages.put("ask-" + call.getKey(), new Message.Request(++id, call.getValue()));
    }
    messages.put("accepted", new Message.Accepted(4, OptionalInt.empty()));
    messages.put("accepted-hello", new Message.Accepted(1, OptionalInt.of(1)));
    messages.put("refused", new Message.Refused(OptionalLong.of(1), -32001, "the token is wrong"));
    messages.put(
        "refused-no-request",
        new Message.Refused(
            OptionalLong.empty(), -32003, "another daemon has connected to the instrument"));
    for (Map.Entry<String, InstrumentEvent> event : events().entrySet()) {
      messages.put("tell-" + event.getKey(), new Message.Told(event.getValue()));
    }
    return messages;
  }
}
