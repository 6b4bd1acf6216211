package beamwarden.dose;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.beam.Point;
import beamwarden.beam.Rectangle;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class BoxTest {
  @Test
  void liesOnAGridOfATenthOfANanometre() {
    assertEquals(
        new Box(-10_000, 0, 10_000, 40_000),
        Box.around(Fixtures.square(0, 2, 2, 4), 0, 0, Axes.SAMPLE));
  }

  @Test
  void isTheSameHoweverAnEdgeWasComputed() {
    // 50.05 nm lies half-way between two steps, and comes out on either side of it.
    Box left = Box.around(Rectangle.of(new Point(0, 0), 100.1e-9, 1e-6), 0, 0, Axes.SAMPLE);
    Box right = Box.around(Rectangle.of(new Point(100.1e-9, 0), 100.1e-9, 1e-6), 0, 0, Axes.SAMPLE);
    assertEquals(left.right(), right.left());
    assertFalse(left.overlaps(right));
  }

  @ParameterizedTest
  @ValueSource(doubles = {0, 90, 180, 270, -90, 450})
  void isExactForQuarterTurns(double turn) {
    Rectangle turned = new Rectangle(Fixtures.point(3, 5), 4e-6, 2e-6, turn);
    Box box = Box.around(turned, 1e-6, 0, Axes.SAMPLE);
    boolean upright = turn % 180 != 0;
    assertEquals(upright ? 20_000 : 60_002, box.right() - box.left());
    assertEquals(upright ? 60_002 : 20_000, box.top() - box.bottom());
  }

  @Test
  void isExactAlongItsOwnAxes() {
    Rectangle turned = new Rectangle(new Point(0, 0), 4e-6, 2e-6, 33);
    assertEquals(new Box(-20_000, -10_000, 20_000, 10_000), Box.around(turned, 0, 0, new Axes(33)));
    assertEquals(new Axes(33), new Axes(123));
    assertEquals(new Axes(33), new Axes(-327));
  }

  @Test
  void surroundsWhatIsTurnedOtherwise() {
    Rectangle turned = new Rectangle(new Point(0, 0), 4e-6, 2e-6, 30);
    Box box = Box.around(turned, 0.5e-6, 0.1e-6, Axes.SAMPLE);
    for (int x = -1; x <= 1; x += 2) {
      for (int y = -1; y <= 1; y += 2) {
        assertTrue(box.contains(Box.square(turned.at(x * 2.5e-6, y * 1.1e-6), 0, Axes.SAMPLE)));
      }
    }
  }

  @Test
  void growsByNoLessThanAsked() {
    Box box = new Box(0, 0, 10, 10);
    assertEquals(box, box.grown(0));
    assertTrue(box.grown(1e-9).left() <= -10);
    assertTrue(box.shrunk(1e-9).left() >= 10);
  }
}
