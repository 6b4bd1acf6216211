package beamwarden.simulated;

import beamwarden.beam.Conditions;
import beamwarden.beam.Point;
import beamwarden.instrument.Fault;
import beamwarden.instrument.Grant;
import beamwarden.instrument.Instrument;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.InstrumentListener;
import beamwarden.instrument.StopWhen;
import java.nio.file.Path;
import java.time.Duration;
import java.util.Optional;
import java.util.Set;

/**
 * The adapter of the simulated instrument: the grant protocol over {@link Hardware} and {@link
 * Notes}, both of which outlive it.
 *
 * <p>To restart an adapter in memory, make another one over the same hardware and notes; the old
 * one ends without warning. Preparing, measuring, exposing and winding down happen in the order in
 * which they were asked for; all else at once. Everything happens on the thread of the line of
 * time, under the hardware's lock, so that verbs may be called from any thread.
 */
public final class SimulatedInstrument implements Instrument {
  private final Hardware hardware;
  private final Notes notes;
  private final Desk desk;
  private final GrantRules rules;

  /** An adapter in memory; its hardware says how it is simulated. */
  public SimulatedInstrument(Hardware hardware, Notes notes) {
    this(hardware, notes, Optional.empty(), () -> {});
  }

  /**
   * An adapter in memory that writes its data, when its hardware's simulation says so.
   *
   * @param folder the folder for its data; nothing else is kept there
   */
  public SimulatedInstrument(Hardware hardware, Notes notes, Path folder) {
    this(hardware, notes, Optional.of(new DataFolder(folder, hardware.time())), () -> {});
  }

  /**
   * An adapter. A scan that an earlier one left running is blanked.
   *
   * @param folder where data goes, if any is written
   * @param death what becomes of the process when it dies
   */
  SimulatedInstrument(Hardware hardware, Notes notes, Optional<DataFolder> folder, Runnable death) {
    this.hardware = hardware;
    this.notes = notes;
    this.desk = new Desk(hardware, notes, new Detector(hardware.simulation(), folder), death);
    this.rules = new GrantRules(hardware, notes, desk.heartbeats());
    desk.takeOver();
  }

  @Override
  public void connect(InstrumentListener listener) {
    hardware
        .time()
        .after(
            Duration.ZERO,
            () -> {
              if (desk.hasEnded()) {
                listener.on(new InstrumentEvent.Lost("the adapter has ended: open it again"));
              } else {
                desk.guarded(() -> connectNow(listener));
              }
            });
  }

  @Override
  public void seal(long fence, String store, Set<Long> grants, boolean handOver) {
    Sealing sealing = new Sealing(fence, store, grants, handOver);
    post(() -> sealing.at(desk, rules));
  }

  @Override
  public void prepare(long request, Conditions conditions, Point stage) {
    post(() -> desk.turns().add(new Preparing(desk, request, conditions, stage)));
  }

  @Override
  public void measure(long request) {
    post(() -> desk.turns().add(new Measuring(desk, request)));
  }

  @Override
  public void begin(Grant grant) {
    post(() -> beginNow(grant));
  }

  @Override
  public void stop(StopWhen when) {
    post(
        () -> {
          desk.dropGrants("a stop was asked for before the grant began");
          desk.running().ifPresent(running -> running.stop(when));
        });
  }

  @Override
  public void heartbeat(long number) {
    post(
        () -> {
          if (desk.heartbeats().beat(number, hardware.time().elapsedNanos())) {
            desk.say(new InstrumentEvent.HeartbeatSeen(number));
          }
        });
  }

  @Override
  public void acknowledge(long grant) {
    post(() -> notes.forget(grant));
  }

  @Override
  public void windDown() {
    post(
        () -> {
          desk.blank("the instrument was wound down before the grant began");
          desk.turns().add(new WindingDown(desk));
        });
  }

  /** Blanks the beam at once, keeps the receipt of what ran, and lets go. */
  @Override
  public void close() {
    desk.guarded(
        () -> {
          desk.link().cut();
          desk.turns().dropAll();
          desk.running().ifPresent(Exposing::endNow);
          desk.end();
        });
  }

  /** The connection is cut from outside; {@link #connect} brings it back. */
  public void cutConnection() {
    desk.guarded(desk::lose);
  }

  /** The adapter's process ends without warning; the hardware goes on. */
  public void die() {
    desk.guarded(() -> desk.die("the adapter's process ended"));
  }

  /** Whether it was closed or its process died; only another one over the same hardware helps. */
  public boolean hasEnded() {
    return desk.hasEnded();
  }

  private void connectNow(InstrumentListener listener) {
    desk.link().to(listener);
    rules.sealed(false);
    desk.turns().dropAll();
    desk.heartbeats().startAnew();
    desk.say(
        new InstrumentEvent.Connected(
            hardware.abilities(), hardware.session(), hardware.readings()));
  }

  private void beginNow(Grant grant) {
    boolean ours = grant.store().equals(notes.store());
    if (ours && (desk.turns().holds(grant.number()) || notes.hasBegun(grant.number()))) {
      sayAgain(grant.number());
      return;
    }
    Optional<Fault> fault = desk.refusal(grant.number()).or(() -> rules.forbids(grant));
    if (fault.isPresent()) {
      desk.refuse(grant.number(), fault.get());
    } else {
      desk.turns().add(new Exposing(desk, grant, rules));
    }
  }

  /**
   * A grant that comes again is never exposed again; its receipt is said again while it is kept.
   */
  private void sayAgain(long grant) {
    notes.kept(grant).ifPresent(receipt -> desk.say(new InstrumentEvent.Ended(receipt)));
  }

  /** Verbs of a connection that is cut are not heard. */
  private void post(Runnable verb) {
    desk.later(
        Duration.ZERO,
        () -> {
          if (desk.link().isUp()) {
            verb.run();
          }
        });
  }
}
