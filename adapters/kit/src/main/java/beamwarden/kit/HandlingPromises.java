package beamwarden.kit;

import beamwarden.beam.BeamSettings;
import beamwarden.beam.Conditions;
import beamwarden.beam.Exposure;
import beamwarden.instrument.Grant;
import beamwarden.instrument.GrantFate;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.InstrumentEvent.Prepared;
import beamwarden.instrument.InstrumentEvent.WoundDown;
import beamwarden.instrument.Readings;
import beamwarden.kit.Recorder.Heard;
import beamwarden.quantity.Voltage;
import java.time.Instant;

/** P15 to P18: how an adapter brings the instrument up, keeps it, and puts it to rest. */
final class HandlingPromises {
  /** How far read-back settings may lie from the wish, as a part of it. */
  private static final double SETTING_TOLERANCE = 0.1;

  private static final double ONE_NANOMETRE = 1e-9;

  private HandlingPromises() {}

  static void p15(Trial trial) {
    Exposure exposure = trial.exposures().shortOne();
    trial.connect();
    trial.seal();
    Prepared prepared = trial.prepare(exposure);
    near(trial, exposure.conditions(), prepared.conditions());
    double off = prepared.stage().distanceMetres(exposure.stageTarget());
    double allowed = trial.rig().abilities().stage().repeatabilityMetres();
    trial.require(
        off <= 2 * allowed + ONE_NANOMETRE, "the stage is " + off + " m away from its target");
    Exposure impossible = withTwiceTheHighestVoltage(trial, exposure);
    InstrumentEvent answer = trial.tryToPrepare(impossible);
    trial.require(
        !(answer instanceof Prepared p
            && p.conditions().beam().voltage().equals(impossible.conditions().beam().voltage())),
        "a voltage beyond the column's reach was read back as reached");
    trial.pass(trial.beats(5));
    trial.require(
        !trial.evidence().isRecorded() || trial.evidence().all().isEmpty(),
        "preparing or measuring sent electrons to the sample: " + trial.evidence().all());
  }

  private static void near(Trial trial, Conditions asked, Conditions read) {
    trial.require(
        asked.mode() == read.mode()
            && asked.filter().equals(read.filter())
            && near(asked.beam().voltage().volts(), read.beam().voltage().volts())
            && near(asked.beam().current().amperes(), read.beam().current().amperes()),
        "asked for " + asked + ", and said to be prepared at " + read);
  }

  private static boolean near(double asked, double read) {
    return Math.abs(asked - read) <= SETTING_TOLERANCE * asked;
  }

  private static Exposure withTwiceTheHighestVoltage(Trial trial, Exposure exposure) {
    Voltage voltage = new Voltage(2 * trial.rig().abilities().column().highestVoltage().volts());
    Conditions asked = exposure.conditions();
    Conditions impossible =
        new Conditions(
            new BeamSettings(voltage, asked.beam().current()), asked.mode(), asked.filter());
    return new Exposure(
        exposure.job(),
        exposure.pass(),
        exposure.sample(),
        exposure.placement(),
        impossible,
        exposure.scan());
  }

  static void p16(Trial trial) {
    Exposure exposure = trial.exposures().longOne();
    trial.ready(exposure);
    isDarkAfter(trial, exposure, trial.instrument()::close, "the adapter was closed");
    trial.prepare(exposure);
    isDarkAfter(trial, exposure, trial.rig()::endInOrder, "the adapter was ended in order");
  }

  private static void isDarkAfter(Trial trial, Exposure exposure, Runnable end, String because) {
    Grant grant = trial.begun(trial.draft(exposure));
    trial.passInto(grant, 0.3);
    end.run();
    Instant ended = trial.now();
    trial.pass(trial.beats(10));
    trial.evidence().dark(grant, ended.plus(trial.beats(1)), because);
    trial.restart();
    trial.require(
        !(trial.fate(grant) instanceof GrantFate.NeverBegun),
        "an exposure that was under way when " + because + " was said never to have begun");
  }

  static void p17(Trial trial) {
    trial.connect();
    String before = trial.session();
    trial.restart();
    trial.require(
        trial.session().equals(before),
        "a restart changed the session from " + before + " to " + trial.session());
    if (!trial.verdict().provoked(trial.rig().doorOpens(), "an opened door")) {
      return;
    }
    trial.restart();
    String after = trial.session();
    trial.require(!after.equals(before), "an opened door left the session as it was: " + after);
  }

  static void p18(Trial trial) {
    Exposure exposure = trial.exposures().longOne();
    trial.ready(exposure);
    Grant grant = trial.begun(trial.draft(exposure));
    trial.passInto(grant, 0.3);
    Heard<WoundDown> answer = trial.ask(trial.instrument()::windDown, WoundDown.class, e -> true);
    Readings readings = answer.event().readings();
    trial.require(
        readings.beamBlanked() && readings.valveClosed(),
        "after winding down the readings are " + readings);
    trial.pass(trial.beats(10));
    trial.evidence().dark(grant, answer.at(), "the instrument was wound down");
    trial.require(
        !(trial.fate(grant) instanceof GrantFate.NeverBegun),
        "an exposure that was ended by winding down was said never to have begun");
  }
}
