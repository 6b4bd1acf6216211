package beamwarden.clockwork;

import java.time.Duration;
import java.time.Instant;
import java.time.temporal.ChronoUnit;
import java.util.Date;
import java.util.Properties;
import java.util.concurrent.atomic.AtomicLong;
import java.util.function.Consumer;
import org.quartz.JobBuilder;
import org.quartz.JobDetail;
import org.quartz.JobKey;
import org.quartz.Scheduler;
import org.quartz.SchedulerException;
import org.quartz.SimpleScheduleBuilder;
import org.quartz.Trigger;
import org.quartz.TriggerBuilder;
import org.quartz.TriggerKey;
import org.quartz.impl.StdSchedulerFactory;

/**
 * Named timers in Quartz: one durable job, and one trigger for each name.
 *
 * <p>Everything lies in memory, as all of it can be derived from the books at any time. Quartz
 * keeps time by the wall clock and may fire up to two milliseconds early.
 */
final class QuartzTimers implements AutoCloseable {
  private static final JobKey JOB = JobKey.jobKey("wake");
  private static final AtomicLong MADE = new AtomicLong();

  /** A trigger that is later than this is a misfire; all of ours then fire at once. */
  private static final int MISFIRE_MILLIS = 5000;

  private final Scheduler scheduler;

  /** Starts Quartz; {@code fired} is told the name of each timer that fires. */
  QuartzTimers(Consumer<String> fired) {
    try {
      scheduler = new StdSchedulerFactory(properties()).getScheduler();
      scheduler.setJobFactory((bundle, unused) -> new WakeJob(fired));
      JobDetail job = JobBuilder.newJob(WakeJob.class).withIdentity(JOB).storeDurably().build();
      scheduler.addJob(job, true);
      scheduler.start();
    } catch (SchedulerException e) {
      throw new ClockworkException("the clock could not be started: " + e.getMessage(), e);
    }
  }

  private static Properties properties() {
    Properties properties = new Properties();
    // Schedulers of one process are told apart by their names.
    properties.put("org.quartz.scheduler.instanceName", "clock-" + MADE.incrementAndGet());
    properties.put("org.quartz.scheduler.makeSchedulerThreadDaemon", "true");
    properties.put("org.quartz.scheduler.skipUpdateCheck", "true");
    properties.put("org.quartz.jobStore.class", "org.quartz.simpl.RAMJobStore");
    properties.put("org.quartz.jobStore.misfireThreshold", Integer.toString(MISFIRE_MILLIS));
    properties.put("org.quartz.threadPool.class", "org.quartz.simpl.SimpleThreadPool");
    properties.put("org.quartz.threadPool.makeThreadsDaemons", "true");
    properties.put("org.quartz.threadPool.threadCount", "1");
    return properties;
  }

  /** Sets a timer to fire once; one of the same name is replaced. */
  void once(String name, Instant wall) {
    SimpleScheduleBuilder once =
        SimpleScheduleBuilder.simpleSchedule().withMisfireHandlingInstructionFireNow();
    set(trigger(name, wall).withSchedule(once).build());
  }

  /** Sets a timer to fire again and again; one of the same name is replaced. */
  void every(String name, Instant firstOnWall, Duration period) {
    SimpleScheduleBuilder again =
        SimpleScheduleBuilder.simpleSchedule()
            .withIntervalInMilliseconds(period.toMillis())
            .repeatForever()
            .withMisfireHandlingInstructionNowWithRemainingCount();
    set(trigger(name, firstOnWall).withSchedule(again).build());
  }

  private static TriggerBuilder<Trigger> trigger(String name, Instant wall) {
    return TriggerBuilder.newTrigger()
        .withIdentity(name)
        .forJob(JOB)
        .startAt(Date.from(roundedUp(wall)));
  }

  private static Instant roundedUp(Instant wall) {
    return wall.plusNanos(999_999).truncatedTo(ChronoUnit.MILLIS);
  }

  private void set(Trigger trigger) {
    try {
      if (scheduler.rescheduleJob(trigger.getKey(), trigger) == null) {
        scheduler.scheduleJob(trigger);
      }
    } catch (SchedulerException e) {
      throw new ClockworkException(
          "the timer " + trigger.getKey().getName() + " could not be set: " + e.getMessage(), e);
    }
  }

  /** Takes a timer back; does nothing when there is none of that name. */
  void cancel(String name) {
    try {
      scheduler.unscheduleJob(TriggerKey.triggerKey(name));
    } catch (SchedulerException e) {
      throw new ClockworkException(
          "the timer " + name + " could not be taken back: " + e.getMessage(), e);
    }
  }

  /** Ends Quartz and its threads, once what is firing has been handed over. */
  @Override
  public void close() {
    try {
      scheduler.shutdown(true);
    } catch (SchedulerException e) {
      throw new ClockworkException("the clock could not be stopped: " + e.getMessage(), e);
    }
  }
}
