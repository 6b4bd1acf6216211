/** Breaks each rule of the architecture on purpose. May import nothing, and does. */
package beamwarden.system.bad.left;
