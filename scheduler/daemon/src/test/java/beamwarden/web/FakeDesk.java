package beamwarden.web;

import beamwarden.document.ProfileDocuments;
import beamwarden.ledger.Books;
import beamwarden.ledger.Entry;
import beamwarden.ledger.Recorded;
import beamwarden.plan.PriorityPlanner;
import beamwarden.profile.Profile;
import beamwarden.run.Desk;
import beamwarden.run.Event;
import beamwarden.run.Run;
import beamwarden.run.RunSettings;
import beamwarden.run.RunSetup;
import beamwarden.run.RunState;
import beamwarden.shift.ShiftCalendar;
import java.nio.file.Path;
import java.time.Instant;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.CompletableFuture;
import java.util.concurrent.CopyOnWriteArrayList;
import java.util.function.Function;

/** A run that does nothing by itself: its entries are put in, and its answers are given. */
public final class FakeDesk implements Desk {
  /** The folder of the queue examples. */
  public static final Path EXAMPLES =
      Path.of(System.getProperty("beamwarden.root", "../.."), "queue-examples");

  /** A Wednesday evening in the lab, ten minutes after the shift opened. */
  public static final Instant EVENING = Instant.parse("2031-03-12T18:10:00Z");

  private final List<Recorded> recorded = new CopyOnWriteArrayList<>();
  private final List<Event.Wish> asked = new CopyOnWriteArrayList<>();
  private final List<Runnable> listeners = new CopyOnWriteArrayList<>();
  private final RunSetup setup;
  private volatile Function<Event.Wish, CompletableFuture<Optional<String>>> answer =
      wish -> CompletableFuture.completedFuture(Optional.empty());
  private volatile RunState state;

  /** A run on the instrument of the examples, with empty books. */
  public FakeDesk() {
    Profile profile =
        ProfileDocuments.read(EXAMPLES.resolve("north-room.yaml")).value().orElseThrow();
    ShiftCalendar calendar =
        new ShiftCalendar(profile.zone(), profile.shifts(), profile.windDown());
    setup = new RunSetup(profile, calendar, RunSettings.usual(), new PriorityPlanner(), "store");
    state = new Run(setup).begin(Books.EMPTY, 1);
  }

  /** Records entries, as a step does, and tells of them. */
  public void record(Entry... entries) {
    List<Recorded> more = new ArrayList<>();
    for (Entry entry : entries) {
      long number = recorded.size() + more.size() + 1L;
      more.add(new Recorded(number, EVENING, 1, entry, "hash" + number));
    }
    recorded.addAll(more);
    state = new Run(setup).begin(state.books().with(more), 1);
    listeners.forEach(Runnable::run);
  }

  /** Answers every wish so from now on. */
  public void answer(Optional<String> refusal) {
    answer = wish -> CompletableFuture.completedFuture(refusal);
  }

  /** Never answers from now on. */
  public void keepSilent() {
    answer = wish -> new CompletableFuture<>();
  }

  /** Answers every wish with this from now on, whenever it is complete. */
  public void answer(CompletableFuture<Optional<String>> later) {
    answer = wish -> later;
  }

  /** Fails at every wish from now on. */
  public void breakDown() {
    answer =
        wish -> {
          throw new IllegalStateException("out of order");
        };
  }

  /** What it was asked for, in order. */
  public List<Event.Wish> asked() {
    return List.copyOf(asked);
  }

  @Override
  public CompletableFuture<Optional<String>> ask(Event.Wish wish) {
    asked.add(wish);
    return answer.apply(wish);
  }

  @Override
  public RunState state() {
    return state;
  }

  @Override
  public RunSetup setup() {
    return setup;
  }

  @Override
  public Instant now() {
    return EVENING;
  }

  @Override
  public List<Recorded> entriesAfter(long number, int most) {
    return recorded.stream().filter(one -> one.number() > number).limit(most).toList();
  }

  @Override
  public AutoCloseable onRecorded(Runnable listener) {
    listeners.add(listener);
    return () -> listeners.remove(listener);
  }
}
