package beamwarden.kit;

import java.util.function.Consumer;
import org.junit.jupiter.api.Assertions;
import org.junit.jupiter.api.Assumptions;
import org.junit.jupiter.api.Test;

/**
 * The suite: one test for each promise of {@link beamwarden.instrument.Instrument}, by its number.
 *
 * <p>An author extends it and supplies {@link #rig()}; JUnit does the rest. A test that fails names
 * the promise, what was seen, and the last events. A test that is aborted names what could not be
 * shown on this rig; what could be tried of that promise has passed by then.
 */
public abstract class AdapterPromises {
  /** A fresh rig on empty notes; each test asks for one and closes it. */
  protected abstract Rig rig() throws Exception;

  /** Whether a promise that could not be shown counts as a failure; false unless overridden. */
  protected boolean showsEverything() {
    return false;
  }

  @Test
  void p01SendsNoElectronExceptUnderAGrant() throws Exception {
    shows(Promise.P1, ExposingPromises::p01);
  }

  @Test
  void p02ExposesInOrderAndEachGrantOnce() throws Exception {
    shows(Promise.P2, ExposingPromises::p02);
  }

  @Test
  void p03NotesThatItBeginsBeforeTheBeamComesOn() throws Exception {
    shows(Promise.P3, ExposingPromises::p03);
  }

  @Test
  void p04BlanksWhenTheGrantsTimeIsUsedUp() throws Exception {
    shows(Promise.P4, ExposingPromises::p04);
  }

  @Test
  void p05EndsAnExposureWhoseCurrentIsTooHigh() throws Exception {
    shows(Promise.P5, ExposingPromises::p05);
  }

  @Test
  void p06StopsWhenAskedAndStartsNothingAfterwards() throws Exception {
    shows(Promise.P6, ExposingPromises::p06);
  }

  @Test
  void p07BlanksWhenTheLeaseEnds() throws Exception {
    shows(Promise.P7, StartingPromises::p07);
  }

  @Test
  void p08NeverBeginsAfterTheLatestStart() throws Exception {
    shows(Promise.P8, StartingPromises::p08);
  }

  @Test
  void p09NeverBeginsWhatTheFenceForbids() throws Exception {
    shows(Promise.P9, StartingPromises::p09);
  }

  @Test
  void p10BlanksAndForbidsBeforeItAnswersASeal() throws Exception {
    shows(Promise.P10, SealPromises::p10);
  }

  @Test
  void p11SaysNeverBegunOnlyWhenThatIsProved() throws Exception {
    shows(Promise.P11, SealPromises::p11);
  }

  @Test
  void p12KeepsAReceiptUntilItIsAcknowledged() throws Exception {
    shows(Promise.P12, SealPromises::p12);
  }

  @Test
  void p13ReportsNoLessThanWasDelivered() throws Exception {
    shows(Promise.P13, ReceiptPromises::p13);
  }

  @Test
  void p14HasItsDataOnDiskBeforeTheReceipt() throws Exception {
    shows(Promise.P14, ReceiptPromises::p14);
  }

  @Test
  void p15ReadsBackWhatItPrepared() throws Exception {
    shows(Promise.P15, HandlingPromises::p15);
  }

  @Test
  void p16BlanksWhenItIsShutDown() throws Exception {
    shows(Promise.P16, HandlingPromises::p16);
  }

  @Test
  void p17KeepsTheSessionUntilTheChamberIsOpened() throws Exception {
    shows(Promise.P17, HandlingPromises::p17);
  }

  @Test
  void p18BlanksAndClosesTheValveWhenItWindsDown() throws Exception {
    shows(Promise.P18, HandlingPromises::p18);
  }

  private void shows(Promise promise, Consumer<Trial> proof) throws Exception {
    Trial trial;
    try (Rig rig = rig()) {
      trial = new Trial(promise, rig);
      proof.accept(trial);
      trial.evidence().lookAgain();
      trial.verdict().requireOrder();
    }
    if (!trial.verdict().notShown().isEmpty()) {
      String what = promise + ", is not shown: " + String.join("; ", trial.verdict().notShown());
      if (showsEverything()) {
        Assertions.fail(what);
      }
      Assumptions.abort(what);
    }
  }
}
