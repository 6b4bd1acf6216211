/**
 * The suite an instrument adapter passes before it is trusted with a sample, with cases as data
 * files and a wrapper that injects faults. Imports the contract.
 */
package beamwarden.kit;
