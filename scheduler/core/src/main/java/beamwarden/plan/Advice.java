package beamwarden.plan;

import beamwarden.dose.CapVerdict;
import beamwarden.queue.AtCap;
import java.math.BigDecimal;
import java.math.MathContext;
import java.math.RoundingMode;
import java.util.ArrayList;
import java.util.List;

/** Concrete changes that would make a job fit that does not, or not whole. */
public final class Advice {
  /** Rounded up: a factor that is a little too small would not do. */
  private static final MathContext TWO_DIGITS_UP = new MathContext(2, RoundingMode.UP);

  private Advice() {}

  /** What to change; empty when the job fits, or when only a person or a shift is waited for. */
  public static List<String> of(JobCheck check) {
    List<String> advice = new ArrayList<>();
    if (check.verdict() == JobCheck.Verdict.FITS) {
      return advice;
    }
    if (check.dose().verdict() instanceof CapVerdict.Refused alone) {
      advice.add(alone(alone));
    }
    boolean refused = check.verdict() == JobCheck.Verdict.REFUSED;
    if (refused && check.job().atCap() == AtCap.REFUSE) {
      advice.add("write at-cap: trim to have as much of it done as fits, or at-cap: ask");
    }
    if (check.job().atCap() == AtCap.ASK && check.verdict() == JobCheck.Verdict.HELD) {
      advice.add("once it is handed in: approve " + check.job().id() + ", with a reason");
    }
    return advice;
  }

  /** The job does not fit even on a sample that has received nothing. */
  private static String alone(CapVerdict.Refused refused) {
    if (!(refused.limit() > 0)) {
      return "move its region: nothing may reach that place";
    }
    BigDecimal factor = new BigDecimal(refused.asked() / refused.limit()).round(TWO_DIGITS_UP);
    return "give it "
        + factor.toPlainString()
        + " times less: a shorter dwell, a lower current, fewer frames, or on fluence a wider pitch";
  }
}
