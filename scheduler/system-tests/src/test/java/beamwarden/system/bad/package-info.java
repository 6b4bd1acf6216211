/**
 * Classes that break the rules of the architecture on purpose, so that each rule is seen to fail.
 * Nothing imports them; they are read as class files only.
 */
package beamwarden.system.bad;
