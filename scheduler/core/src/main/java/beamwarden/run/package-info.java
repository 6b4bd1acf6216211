/**
 * The engine that carries out a plan as pure steps: exposures, checkpoints, resuming and classes of
 * fault. Imports {@code instrument}, {@code plan} and what a plan is made of.
 */
package beamwarden.run;
