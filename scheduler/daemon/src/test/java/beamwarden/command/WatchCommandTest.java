package beamwarden.command;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.ledger.Entry;
import beamwarden.ledger.Entry.Noted.What;
import beamwarden.queue.HeldFor;
import beamwarden.queue.Job;
import beamwarden.queue.JobState;
import beamwarden.queue.Queue;
import beamwarden.web.FakeDesk;
import beamwarden.web.Served;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Optional;
import java.util.concurrent.CompletableFuture;
import java.util.concurrent.TimeUnit;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.Timeout;
import org.junit.jupiter.api.io.TempDir;

@Timeout(60)
class WatchCommandTest {
  @TempDir Path store;
  private final Called.Caller caller = new Called.Caller();
  private final FakeDesk desk = new FakeDesk();
  private Served served;
  private Queue queue;

  @BeforeEach
  void serve() {
    served = Served.in(store, desk);
    queue = served.submitOvernight();
    caller.environment.put("BEAMWARDEN_STORE", store.toString());
  }

  @AfterEach
  void close() {
    served.close();
  }

  private CompletableFuture<Called> watch(Object... options) {
    Object[] arguments = new Object[options.length + 1];
    arguments[0] = "watch";
    System.arraycopy(options, 0, arguments, 1, options.length);
    CompletableFuture<Called> watching =
        CompletableFuture.supplyAsync(() -> caller.call(arguments));
    caller.awaitAnswer("grain-yield");
    return watching;
  }

  private static Called result(CompletableFuture<Called> watching) throws Exception {
    return watching.get(40, TimeUnit.SECONDS);
  }

  private void change(String job, JobState state) {
    desk.record(new Entry.JobChanged(job, state, Optional.empty(), ""));
  }

  private void endAll(JobState state) {
    queue.jobs().stream().map(Job::id).forEach(id -> change(id, state));
  }

  @Test
  void endsWhenEveryJobHasEndedAndTellsEachChangeInALine() throws Exception {
    CompletableFuture<Called> watching = watch();
    change("texture", JobState.RUNNING);
    endAll(JobState.DONE);
    Called called = result(watching);
    assertEquals(0, called.code(), called.err());
    assertTrue(called.out().contains("19:10  vein done\n"), called.out());
    assertTrue(called.out().endsWith("Every job is done.\n"), called.out());
  }

  @Test
  void saysNoOnceAskedToWaitUntilAllIsDoneAndItIsNot() throws Exception {
    endAll(JobState.REFUSED);
    assertEquals(0, result(watch()).code());
    Called called = result(watch("--until-done"));
    assertEquals(1, called.code());
    assertTrue(
        called.out().endsWith("0 of 8 jobs are done, and no other can run; report says why.\n"),
        called.out());
  }

  @Test
  void endsWhenAllThatIsLeftWaitsForAPerson() throws Exception {
    endAll(JobState.DONE);
    desk.record(
        new Entry.JobChanged("vein", JobState.HELD, Optional.of(HeldFor.A_PERSON), "a person"));
    assertTrue(result(watch()).out().contains("7 of 8 jobs are done"));
  }

  @Test
  void endsWhenTheNightIsStopped() throws Exception {
    CompletableFuture<Called> watching = watch();
    desk.record(new Entry.Noted(What.STOPPED, "the vacuum is gone"));
    Called called = result(watching);
    assertTrue(
        called.out().endsWith("and the night is stopped; release --all lets it go on.\n"),
        called.out());
  }

  @Test
  void comesBackToADaemonThatIsStartedAgainElsewhereAndMissesNothing() throws Exception {
    CompletableFuture<Called> watching = watch();
    change("texture", JobState.RUNNING);
    caller.awaitAnswer("texture running");
    served.close();
    Files.delete(store.resolve("address"));
    change("texture", JobState.DONE);
    change("vein", JobState.RUNNING);
    served = Served.in(store, desk);
    endAll(JobState.DONE);
    Called called = result(watching);
    assertEquals(0, called.code(), called.err());
    String lines = called.out();
    assertEquals(1, count(lines, "vein running"), lines);
    assertEquals(1, count(lines, "vein done"), lines);
  }

  private static int count(String text, String part) {
    return text.split(part, -1).length - 1;
  }

  @Test
  void givesUpOnADaemonThatStaysOutOfReach() throws Exception {
    CompletableFuture<Called> watching = watch("--patience", "1");
    change("texture", JobState.RUNNING);
    caller.awaitAnswer("texture running");
    served.close();
    Called called = result(watching);
    assertEquals(3, called.code());
    assertTrue(called.err().contains("out of reach for 1 s"), called.err());
  }

  @Test
  void drawsBarsOnATerminal() throws Exception {
    caller.terminal = true;
    endAll(JobState.DONE);
    String drawn = result(watch()).out();
    assertTrue(
        drawn.contains("texture                  done      |########################| 100 %"),
        drawn);
    assertTrue(!result(watch("--plain")).out().contains("|"));
  }

  @Test
  void tellsEventsAsTheyCameInJson() throws Exception {
    CompletableFuture<Called> watching = watch("--json");
    endAll(JobState.DONE);
    Called called = result(watching);
    called.out().lines().forEach(line -> assertTrue(line.startsWith("{"), line));
    assertTrue(called.out().contains("\"kind\":\"job-changed\""), called.out());
  }

  @Test
  void cutsAReasonThatIsTooLongForALine() throws Exception {
    CompletableFuture<Called> watching = watch();
    desk.record(new Entry.Noted(What.FAULT, "a long story ".repeat(20)));
    endAll(JobState.DONE);
    Called called = result(watching);
    called.out().lines().forEach(line -> assertTrue(line.length() <= 80, line));
    assertTrue(called.out().contains("fault: a long story a long story"), called.out());
  }

  @Test
  void hasNothingToWatchWithoutJobs() throws IOException {
    served.close();
    served = Served.in(store, new FakeDesk());
    Called called = caller.call("watch");
    assertEquals(0, called.code());
    assertEquals("There are no jobs.\n", called.out());
  }
}
