/**
 * Rules for unattended shifts and the windows they open, as plain date arithmetic. Imports {@code
 * timing}.
 */
package beamwarden.shift;
