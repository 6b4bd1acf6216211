/**
 * The suite an instrument adapter passes before it is trusted with a sample.
 *
 * <p>It knows an adapter by the verbs and events of {@link beamwarden.instrument.Instrument} alone,
 * and has one test for each of the promises P1 to P18 listed there. An author takes this module in
 * test scope, writes a {@linkplain beamwarden.kit.Rig rig} around his adapter, and runs:
 *
 * <pre>{@code
 * final class NorthRoomPromisesTest extends AdapterPromises {
 *   @Override
 *   protected Rig rig() throws IOException {
 *     return new NorthRoomRig(Files.createTempDirectory("north-room"));
 *   }
 * }
 * }</pre>
 *
 * <p>Each test asks for a rig of its own, on empty notes, and closes it. What a rig cannot
 * {@linkplain beamwarden.kit.Provocation provoke}, or has no {@linkplain beamwarden.kit.Rig#truth()
 * independent record} of, is reported as not shown (to JUnit: aborted, with the promise and the
 * reason), never as passed; {@link beamwarden.kit.AdapterPromises#showsEverything()} turns that
 * into a failure.
 *
 * <p>The suite exposes some tens of short scans at one place of a sample: give it ground that may
 * be spent. What it cannot see from outside, it does not claim: that a note or a data file has
 * reached the disk (a killed process does not tell), that a reading is not invented, and a record
 * of what was delivered that lies as the adapter does.
 *
 * <p>Terms: a <em>rig</em> is what makes an adapter testable; its <em>beat</em> is the time in
 * which an answer surely comes; a <em>provocation</em> is a fault made on purpose; a
 * <em>stretch</em> is beam on a sample without a break that the record would show.
 *
 * <p>May import {@code instrument}, {@code beam}, {@code quantity}, {@code timing}, and JUnit.
 */
package beamwarden.kit;
