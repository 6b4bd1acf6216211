/**
 * The command line: one class per subcommand, exit codes in one place. The only package that writes
 * to standard output.
 *
 * <p>May import everything but {@code store}, {@code clockwork}, {@code web}, {@code web.api},
 * {@code web.stream}, {@code bridge}, {@code simulated} and {@code kit}: it asks a running daemon
 * over HTTP, and what runs in its own process is put together by the wiring.
 */
package beamwarden.command;
