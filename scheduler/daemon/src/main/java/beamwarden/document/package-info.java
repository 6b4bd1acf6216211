/**
 * Reads queues and instrument profiles, naming file, line and column in each error, and writes JSON
 * in a stable order. Imports the core and the contract.
 */
package beamwarden.document;
