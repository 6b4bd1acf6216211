/**
 * Elapsed time, deadlines, clock steps and virtual time. One of the few places that may read the
 * system clock; imports nothing but the JDK.
 */
package beamwarden.timing;
