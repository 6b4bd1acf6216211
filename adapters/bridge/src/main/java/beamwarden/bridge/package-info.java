/**
 * Instruments whose adapter is written in any language, spoken to over JSON-RPC 2.0 as a child
 * process or through a socket. Imports the contract.
 */
package beamwarden.bridge;
