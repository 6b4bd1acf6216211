package beamwarden.wiring;

import beamwarden.command.Workshop;
import beamwarden.command.WorkshopException;
import beamwarden.document.Documents;
import beamwarden.document.ProfileDocuments;
import beamwarden.ledger.JournalException;
import beamwarden.profile.Profile;
import beamwarden.store.SqliteJournal;
import beamwarden.timing.TimeAnchor;
import beamwarden.web.WebException;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Instant;
import java.util.Optional;
import java.util.function.Supplier;

/** Puts the program's parts together for the commands; the only maker of all of them. */
public final class Wiring implements Workshop {
  @Override
  public Instant now(Optional<Path> store) {
    return guarded(
        () ->
            store
                .map(ServeFolder::new)
                .flatMap(LineOfTime::known)
                .orElseGet(TimeAnchor::real)
                .onLine(Instant.now()));
  }

  @Override
  public Shelf shelf(Path store) {
    return guarded(
        () -> {
          Profile profile = profileOf(new ServeFolder(store));
          try (SqliteJournal journal = SqliteJournal.readOnly(store)) {
            return new Shelf(profile, journal.read());
          }
        });
  }

  private static Profile profileOf(ServeFolder folder) {
    Path kept = folder.profile();
    if (!Files.exists(kept)) {
      throw new WiringException(
          folder.root() + " holds no store: no daemon has served it; name another with --store");
    }
    return ProfileDocuments.read(kept)
        .value()
        .orElseThrow(
            () ->
                new WiringException(
                    kept + " can no longer be read; serve the store once with its profile"));
  }

  @Override
  public Rehearsed rehearse(RehearsalAsked asked) {
    return guarded(
        () -> {
          RehearsedNight night =
              RehearsedNight.of(
                  asked.queue(),
                  asked.profile(),
                  asked.known(),
                  asked.from(),
                  asked.seed(),
                  asked.noise());
          return new Rehearsed(night.recorded(), night.ended(), night.refusal());
        });
  }

  @Override
  public Serving serve(ServeAsked asked) {
    return guarded(
        () -> {
          ServeFolder folder = new ServeFolder(asked.store());
          folder.make();
          NightDaemon daemon =
              NightDaemon.start(
                  new NightDaemon.Start(
                      asked.profile(),
                      Documents.hash(asked.document()),
                      asked.store(),
                      asked.pace(),
                      asked.from(),
                      asked.seed(),
                      asked.port()));
          keep(folder, asked.document());
          return daemon;
        });
  }

  private static void keep(ServeFolder folder, String profile) {
    try {
      ServeFolder.writePrivately(folder.profile(), profile);
    } catch (IOException failure) {
      throw new WiringException(
          "the profile cannot be kept in " + folder.root() + ": " + failure.getMessage());
    }
  }

  /** Every part's failure is told as one sentence. */
  private static <T> T guarded(Supplier<T> work) {
    try {
      return work.get();
    } catch (WiringException | JournalException | WebException failure) {
      throw new WorkshopException(failure.getMessage(), failure);
    }
  }
}
