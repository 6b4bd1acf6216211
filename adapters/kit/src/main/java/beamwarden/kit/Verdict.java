package beamwarden.kit;

import beamwarden.instrument.InstrumentEvent;
import beamwarden.kit.Recorder.Heard;
import java.util.ArrayList;
import java.util.List;

/** What is held against an adapter, and what could not be tried. */
final class Verdict {
  private static final int TOLD_EVENTS = 8;
  private static final int MOST_OF_AN_EVENT = 300;

  private final Promise promise;
  private final Recorder recorder;
  private final List<String> notShown = new ArrayList<>();

  Verdict(Promise promise, Recorder recorder) {
    this.promise = promise;
    this.recorder = recorder;
  }

  /** Fails unless a part of the promise was kept. */
  void require(boolean kept, String otherwise) {
    if (!kept) {
      throw broken(otherwise);
    }
  }

  /** Fails when the order of all events so far is none that can be. */
  void requireOrder() {
    List<InstrumentEvent> events = new ArrayList<>();
    recorder.heard().forEach(heard -> events.add(heard.event()));
    EventOrder.broken(events)
        .ifPresent(
            what -> {
              throw broken(what);
            });
  }

  /** The failure itself, with what was heard last. */
  AssertionError broken(String what) {
    List<Heard<?>> heard = recorder.heard();
    StringBuilder told = new StringBuilder(promise + ": " + what + ". Last heard:");
    heard
        .subList(Math.max(0, heard.size() - TOLD_EVENTS), heard.size())
        .forEach(one -> told.append("\n  ").append(one.at()).append(' ').append(text(one)));
    return new AssertionError(told.toString());
  }

  private static String text(Heard<?> one) {
    String text = one.event().toString();
    return text.length() <= MOST_OF_AN_EVENT ? text : text.substring(0, MOST_OF_AN_EVENT) + "...";
  }

  /** Makes a fault; false when this rig cannot, which is then reported. */
  boolean provoked(Provocation provocation, String what) {
    provocation
        .act()
        .ifPresentOrElse(
            Runnable::run, () -> notShown(what + " cannot be provoked: " + provocation.whyNot()));
    return provocation.act().isPresent();
  }

  /** Notes that a part of the promise could not be tried. */
  void notShown(String why) {
    notShown.add(why);
  }

  /** What could not be tried. */
  List<String> notShown() {
    return List.copyOf(notShown);
  }
}
