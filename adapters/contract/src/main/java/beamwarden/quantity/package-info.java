/**
 * Physical quantities as records with one unit each: energy, current, charge, length, area and
 * fluence, with their parsing and printing. Imports nothing but the JDK.
 */
package beamwarden.quantity;
