/**
 * The command line: one class per command, exit codes in one place. The only package that writes to
 * standard output.
 *
 * <p>{@code check} and {@code rehearse} answer by themselves, {@code serve} runs a daemon, all
 * others speak REST to one. What needs the parts put together is asked of a {@link
 * beamwarden.command.Workshop}, found at run time. The answer of a command goes to standard output,
 * as a page or with {@code --json} as JSON; everything else goes to standard error.
 *
 * <p>May import {@code answer}, {@code document}, {@code report}, {@code run}, {@code plan}, {@code
 * estimate}, {@code ledger}, {@code dose}, {@code physics}, {@code profile}, {@code queue}, {@code
 * shift}, {@code instrument}, {@code beam}, {@code quantity} and {@code timing}.
 */
package beamwarden.command;
