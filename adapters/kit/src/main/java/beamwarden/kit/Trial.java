package beamwarden.kit;

import beamwarden.beam.Exposure;
import beamwarden.instrument.Grant;
import beamwarden.instrument.GrantFate;
import beamwarden.instrument.Instrument;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.InstrumentEvent.Begun;
import beamwarden.instrument.InstrumentEvent.Connected;
import beamwarden.instrument.InstrumentEvent.Ended;
import beamwarden.instrument.InstrumentEvent.HeartbeatSeen;
import beamwarden.instrument.InstrumentEvent.Measured;
import beamwarden.instrument.InstrumentEvent.NotMeasured;
import beamwarden.instrument.InstrumentEvent.NotPrepared;
import beamwarden.instrument.InstrumentEvent.Prepared;
import beamwarden.instrument.InstrumentEvent.SealRefused;
import beamwarden.instrument.InstrumentEvent.Sealed;
import beamwarden.instrument.Receipt;
import beamwarden.instrument.SealReport;
import beamwarden.kit.Recorder.Heard;
import java.time.Duration;
import java.time.Instant;
import java.util.Optional;
import java.util.Set;
import java.util.function.Predicate;

/** One promise, tried on one rig: the part of a daemon, with an eye on what is answered. */
final class Trial {
  static final String STORE = "store-of-the-suite";
  static final String OTHER_STORE = "store-of-a-stranger";

  private final Rig rig;
  private final Recorder recorder;
  private final Exposures exposures;
  private final Verdict verdict;
  private final Evidence evidence;
  private String session = "";
  private long fence;
  private long heartbeats;
  private long grants;
  private long requests;

  Trial(Promise promise, Rig rig) {
    this.rig = rig;
    this.recorder = new Recorder(rig.time());
    this.exposures = new Exposures(rig);
    this.verdict = new Verdict(promise, recorder);
    this.evidence = new Evidence(rig, recorder, verdict);
  }

  Rig rig() {
    return rig;
  }

  Recorder recorder() {
    return recorder;
  }

  Exposures exposures() {
    return exposures;
  }

  Verdict verdict() {
    return verdict;
  }

  Evidence evidence() {
    return evidence;
  }

  long fence() {
    return fence;
  }

  String session() {
    return session;
  }

  long heartbeatNumber() {
    return heartbeats;
  }

  Instrument instrument() {
    return rig.instrument();
  }

  Instant now() {
    return rig.time().now();
  }

  Duration beats(int count) {
    return rig.beat().multipliedBy(count);
  }

  void pass(Duration time) {
    rig.time().pass(time);
  }

  /** Connects, seals, prepares and measures: all that comes before the first grant. */
  void ready(Exposure exposure, Long... asked) {
    connect();
    seal(asked);
    prepare(exposure);
  }

  void connect() {
    Connected connected =
        ask(() -> instrument().connect(recorder), Connected.class, e -> true).event();
    session = connected.session();
  }

  void restart() {
    rig.restart();
    connect();
  }

  /** Seals with the next higher fence. */
  Heard<Sealed> seal(Long... asked) {
    fence++;
    Heard<InstrumentEvent> answer = seal(fence, STORE, false, asked);
    require(answer.event() instanceof Sealed, "a seal with a higher fence was refused");
    SealReport report = ((Sealed) answer.event()).report();
    require(
        report.fates().keySet().containsAll(Set.of(asked)),
        "a seal that asked about " + Set.of(asked) + " was told of " + report.fates().keySet());
    return new Heard<>(answer.at(), (Sealed) answer.event());
  }

  Heard<InstrumentEvent> seal(long withFence, String store, boolean handOver, Long... asked) {
    return ask(
        () -> instrument().seal(withFence, store, Set.of(asked), handOver),
        InstrumentEvent.class,
        e -> e instanceof Sealed || e instanceof SealRefused);
  }

  GrantFate fate(Grant grant) {
    return seal(grant.number()).event().report().fates().get(grant.number());
  }

  /** Brings the instrument to an exposure's conditions and reads the current, as before a grant. */
  Prepared prepare(Exposure exposure) {
    InstrumentEvent answer = tryToPrepare(exposure);
    require(answer instanceof Prepared, "the suite's own conditions were not reached: " + answer);
    long request = ++requests;
    ask(
        () -> instrument().measure(request),
        InstrumentEvent.class,
        e ->
            (e instanceof Measured m && m.request() == request)
                || (e instanceof NotMeasured n && n.request() == request));
    return (Prepared) answer;
  }

  InstrumentEvent tryToPrepare(Exposure exposure) {
    long request = ++requests;
    return ask(
            () -> instrument().prepare(request, exposure.conditions(), exposure.stageTarget()),
            InstrumentEvent.class,
            e ->
                (e instanceof Prepared p && p.request() == request)
                    || (e instanceof NotPrepared n && n.request() == request))
        .event();
  }

  Heard<HeartbeatSeen> heartbeat() {
    long number = ++heartbeats;
    return ask(
        () -> instrument().heartbeat(number), HeartbeatSeen.class, e -> e.number() == number);
  }

  /** A new grant, counted from a heartbeat of just now. */
  Draft draft(Exposure exposure) {
    heartbeat();
    return new Draft(this, ++grants, exposure);
  }

  /** Begins a grant and waits until it has begun. */
  Grant begun(Draft draft) {
    Grant grant = draft.grant();
    instrument().begin(grant);
    awaitBegun(grant);
    return grant;
  }

  Heard<Begun> awaitBegun(Grant grant) {
    return await(0, Begun.class, e -> e.grant() == grant.number());
  }

  /** Waits for the end of what runs; an exposure that nothing ends early has time enough. */
  Heard<Ended> awaitEnded(Grant grant) {
    Duration whole = exposures.lead(grant.exposure()).plus(grant.exposure().scan().duration());
    return await(
        0, Ended.class, e -> e.receipt().grant() == grant.number(), whole.plus(rig.patience()));
  }

  Receipt exposed(Exposure exposure) {
    return awaitEnded(begun(draft(exposure))).event().receipt();
  }

  /** Lets the first part of a running exposure pass, then some more beats. */
  void passInto(Grant grant, double part) {
    long nanos = (long) (grant.exposure().scan().duration().toNanos() * part);
    pass(exposures.lead(grant.exposure()).plusNanos(nanos));
  }

  /** Begins a grant that must be refused. */
  void refuses(Draft draft, String because) {
    Grant grant = draft.grant();
    instrument().begin(grant);
    rig.time()
        .until(() -> evidence.toldRefused(grant) || evidence.toldBegun(grant), rig.patience());
    staysRefused(grant, because);
  }

  /** Holds it against the adapter when a grant has begun, or was not answered. */
  void staysRefused(Grant grant, String because) {
    evidence.neverBegan(grant, because);
    require(evidence.toldRefused(grant), "a grant was neither begun nor refused (" + because + ")");
  }

  /** Asks and waits for the answer, which must come. */
  <E extends InstrumentEvent> Heard<E> ask(Runnable verb, Class<E> kind, Predicate<E> wished) {
    int mark = recorder.mark();
    verb.run();
    return await(mark, kind, wished);
  }

  /** Waits for what must come within the rig's patience. */
  <E extends InstrumentEvent> Heard<E> await(int mark, Class<E> kind, Predicate<E> wished) {
    return await(mark, kind, wished, rig.patience());
  }

  private <E extends InstrumentEvent> Heard<E> await(
      int mark, Class<E> kind, Predicate<E> wished, Duration atMost) {
    Optional<Heard<E>> heard = recorder.await(mark, kind, wished, atMost);
    if (heard.isEmpty()) {
      verdict.requireOrder();
      throw verdict.broken("no " + kind.getSimpleName() + " came within " + atMost);
    }
    return heard.get();
  }

  void require(boolean kept, String otherwise) {
    verdict.require(kept, otherwise);
  }
}
