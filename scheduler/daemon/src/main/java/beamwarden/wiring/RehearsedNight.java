package beamwarden.wiring;

import beamwarden.instrument.AdapterProvider;
import beamwarden.instrument.Instrument;
import beamwarden.ledger.Entry;
import beamwarden.ledger.MemoryJournal;
import beamwarden.ledger.Recorded;
import beamwarden.profile.Profile;
import beamwarden.queue.Queue;
import beamwarden.run.Event;
import beamwarden.run.Rehearsal;
import beamwarden.run.RunSetup;
import beamwarden.run.RunState;
import beamwarden.timing.VirtualTime;
import java.nio.file.Path;
import java.time.Duration;
import java.time.Instant;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.ServiceLoader;

/**
 * A night rehearsed: the same engine in virtual time, on a simulated instrument in this process,
 * with books that are forgotten.
 *
 * @param recorded what was recorded, the books it began with included
 * @param state how it ended
 * @param ended when it ended
 * @param refusal why the queue was not taken, if it was not
 */
record RehearsedNight(
    List<Recorded> recorded, RunState state, Instant ended, Optional<String> refusal) {
  private static final String ADAPTER = "simulated";

  /** How long a rehearsal goes on, on its own line of time, when jobs are still waiting. */
  private static final Duration LONGEST = Duration.ofDays(60);

  /**
   * Rehearses a queue.
   *
   * @param known entries of a store with which to begin; may be empty
   * @param from when it begins
   * @param seed the seed of the simulated instrument
   * @param noise whether there is any chance at all
   */
  static RehearsedNight of(
      Queue queue, Profile profile, List<Recorded> known, Instant from, long seed, boolean noise) {
    VirtualTime time = new VirtualTime(from);
    MemoryJournal journal = new MemoryJournal("rehearsal");
    begin(journal, profile.abilities().instrument(), known);
    RunSetup setup = NightDaemon.setup(profile, 1, journal.store());
    try (Instrument instrument = instrument(profile, seed, noise, time)) {
      Rehearsal rehearsal =
          new Rehearsal(setup, profile.abilities().instrument(), journal, instrument, time);
      Optional<String> refusal = rehearsal.ask(new Event.Wish.Submit(queue, ""));
      if (refusal.isEmpty()) {
        rehearsal.start();
        rehearsal.runUntilDone(from.plus(LONGEST));
      }
      return new RehearsedNight(journal.read(), rehearsal.state(), time.instant(), refusal);
    }
  }

  /** Takes over what a store knows; its fences and its session are its own affair. */
  private static void begin(MemoryJournal journal, String instrument, List<Recorded> known) {
    if (known.isEmpty()) {
      return;
    }
    long fence = journal.raiseFence(instrument, known.get(0).at());
    for (Recorded one : known) {
      boolean ofTheStore =
          one.entry() instanceof Entry.FenceRaised || one.entry() instanceof Entry.SessionSeen;
      if (!ofTheStore) {
        journal.commit(fence, one.at(), List.of(one.entry()));
      }
    }
  }

  private static Instrument instrument(
      Profile profile, long seed, boolean noise, VirtualTime time) {
    AdapterProvider provider =
        ServiceLoader.load(AdapterProvider.class).stream()
            .map(ServiceLoader.Provider::get)
            .filter(found -> found.name().equals(ADAPTER))
            .findFirst()
            .orElseThrow(() -> new WiringException("the simulated adapter is missing; install it"));
    Map<String, String> options =
        Map.of(
            "notes",
            "memory",
            "data",
            "off",
            "seed",
            Long.toString(seed),
            "noise",
            noise ? "on" : "off");
    AdapterProvider.Setting setting =
        new AdapterProvider.Setting(profile.abilities(), Path.of("rehearsal"), options);
    return provider.open(setting, time);
  }
}
