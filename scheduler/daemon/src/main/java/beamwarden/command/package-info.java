/**
 * The command line: one class per subcommand, exit codes in one place. The only package that writes
 * to standard output.
 */
package beamwarden.command;
