package beamwarden.clockwork;

import java.util.function.Consumer;
import org.quartz.Job;
import org.quartz.JobExecutionContext;

/** Hands over that a trigger has fired, by the trigger's name. */
final class WakeJob implements Job {
  private final Consumer<String> fired;

  WakeJob(Consumer<String> fired) {
    this.fired = fired;
  }

  @Override
  public void execute(JobExecutionContext context) {
    fired.accept(context.getTrigger().getKey().getName());
  }
}
