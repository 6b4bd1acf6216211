package beamwarden.kit;

import beamwarden.beam.Exposure;
import beamwarden.instrument.CurrentMeter;
import beamwarden.instrument.DataFile;
import beamwarden.instrument.Grant;
import beamwarden.instrument.GrantFate;
import beamwarden.instrument.Receipt;
import java.io.IOException;
import java.nio.file.Files;
import java.security.MessageDigest;
import java.security.NoSuchAlgorithmException;
import java.time.Duration;
import java.util.HexFormat;
import java.util.List;

/** P13 and P14: what a receipt says, and what it rests on. */
final class ReceiptPromises {
  /** What a comparison of two computed times forgives. */
  private static final double ROUNDING_SECONDS = 1e-6;

  private ReceiptPromises() {}

  static void p13(Trial trial) {
    if (!trial.evidence().isRecorded()) {
      return;
    }
    Exposure exposure = trial.exposures().ofLines(5);
    trial.ready(exposure);
    runsToItsEnd(trial, exposure);
    Duration part = exposure.scan().beamOn().multipliedBy(3).dividedBy(10);
    Grant cut = trial.begun(trial.draft(exposure).longestBeamOn(part));
    demandNoSmaller(trial, cut, trial.awaitEnded(cut).event().receipt());
    Grant sealed = trial.begun(trial.draft(exposure));
    trial.passInto(sealed, 0.55);
    if (trial.fate(sealed) instanceof GrantFate.Reported reported) {
      demandNoSmaller(trial, sealed, reported.receipt());
    }
    trial
        .exposures()
        .spot(20)
        .ifPresent(
            spot -> {
              trial.prepare(spot);
              runsToItsEnd(trial, spot);
            });
  }

  private static void runsToItsEnd(Trial trial, Exposure exposure) {
    Grant grant = trial.begun(trial.draft(exposure));
    Receipt receipt = trial.awaitEnded(grant).event().receipt();
    trial.require(
        receipt.complete(exposure.scan().units()),
        "an undisturbed exposure ended early: " + receipt);
    demandNoSmaller(trial, grant, receipt);
    trial.require(
        !trial.evidence().under(grant).isEmpty(), "the record does not show a whole exposure");
  }

  private static void demandNoSmaller(Trial trial, Grant grant, Receipt receipt) {
    trial.evidence().demand(() -> noSmaller(trial, grant, receipt));
  }

  private static void noSmaller(Trial trial, Grant grant, Receipt receipt) {
    List<Stretch> truth = trial.evidence().under(grant);
    double beamOn = trial.evidence().beamOnSeconds(grant);
    trial.require(
        beamOn <= receipt.beamOn().toNanos() / 1e9 * (1 + ROUNDING_SECONDS) + ROUNDING_SECONDS,
        "a receipt of " + receipt.beamOn() + " hides a beam that was on for " + beamOn + " s");
    long units = truth.stream().map(Stretch::units).mapToLong(u -> u.orElse(0)).sum();
    trial.require(
        units <= receipt.unitsTouched(),
        "a receipt of " + receipt.unitsTouched() + " units hides " + units);
    receipt
        .highestCurrent()
        .ifPresent(
            reading -> truth.forEach(s -> currentNoLower(trial, reading.current().amperes(), s)));
  }

  private static void currentNoLower(Trial trial, double readAmperes, Stretch stretch) {
    CurrentMeter meter = trial.rig().abilities().meter();
    double atMost = readAmperes * (1 + meter.tolerance()) + meter.floor().amperes();
    trial.require(
        stretch.highestCurrent().amperes() <= atMost * (1 + ROUNDING_SECONDS),
        "a receipt of at most " + atMost + " A hides " + stretch.highestCurrent());
  }

  static void p14(Trial trial) {
    Exposure exposure = trial.exposures().shortOne();
    trial.ready(exposure);
    Receipt receipt = trial.exposed(exposure);
    if (receipt.files().isEmpty()) {
      trial.verdict().notShown("the receipt names no data file");
      return;
    }
    receipt.files().forEach(file -> isWhole(trial, file));
  }

  private static void isWhole(Trial trial, DataFile file) {
    try {
      byte[] content = Files.readAllBytes(trial.rig().data(file));
      trial.require(
          content.length == file.bytes() && sha256(content).equals(file.sha256()),
          "the data file " + file.path() + " is not what its receipt says");
    } catch (IOException e) {
      throw trial.verdict().broken("the data file " + file.path() + " cannot be read: " + e);
    }
  }

  static String sha256(byte[] content) {
    try {
      return HexFormat.of().formatHex(MessageDigest.getInstance("SHA-256").digest(content));
    } catch (NoSuchAlgorithmException e) {
      throw new IllegalStateException("every Java has SHA-256", e);
    }
  }
}
