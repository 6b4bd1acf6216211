/** Closes the circle with {@code left}, and is the only one allowed to. */
package beamwarden.system.bad.right;
