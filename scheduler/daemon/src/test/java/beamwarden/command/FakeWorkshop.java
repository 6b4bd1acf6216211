package beamwarden.command;

import beamwarden.document.ProfileDocuments;
import beamwarden.ledger.Recorded;
import beamwarden.profile.Profile;
import beamwarden.web.FakeDesk;
import java.net.URI;
import java.nio.file.Path;
import java.time.Instant;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;

/** A workshop that remembers what it was asked for. */
final class FakeWorkshop implements Workshop {
  static final Instant NOW = Instant.parse("2031-03-12T17:30:00Z");

  final List<Path> stores = new ArrayList<>();
  final List<RehearsalAsked> rehearsals = new ArrayList<>();
  final List<ServeAsked> serving = new ArrayList<>();
  List<Recorded> entries = List.of();
  Optional<String> refusal = Optional.empty();
  Optional<RuntimeException> failure = Optional.empty();

  static Profile profile() {
    return ProfileDocuments.read(FakeDesk.EXAMPLES.resolve("north-room.yaml"))
        .value()
        .orElseThrow();
  }

  @Override
  public Instant now(Optional<Path> store) {
    fail();
    store.ifPresent(stores::add);
    return NOW;
  }

  @Override
  public Shelf shelf(Path store) {
    fail();
    stores.add(store);
    return new Shelf(profile(), entries);
  }

  @Override
  public Rehearsed rehearse(RehearsalAsked asked) {
    fail();
    rehearsals.add(asked);
    return new Rehearsed(entries, FakeDesk.EVENING, refusal);
  }

  @Override
  public Serving serve(ServeAsked asked) {
    fail();
    serving.add(asked);
    return new Serving() {
      @Override
      public URI address() {
        return URI.create("http://127.0.0.1:4711");
      }

      @Override
      public String awaitHalt() {
        return "the books cannot be written";
      }

      @Override
      public void close() {}
    };
  }

  private void fail() {
    if (failure.isPresent()) {
      throw failure.get();
    }
  }
}
