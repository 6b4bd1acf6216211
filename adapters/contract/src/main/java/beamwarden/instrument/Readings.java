package beamwarden.instrument;

import beamwarden.beam.Conditions;
import beamwarden.beam.Point;
import java.util.Optional;

/**
 * What an instrument reports of its condition.
 *
 * @param beamBlanked whether the beam is verified to be off the sample
 * @param valveClosed whether the column valve is closed
 * @param highVoltageOn whether the accelerating voltage is on
 * @param conditions what it is set to, when it is set to anything
 * @param stage where the stage is
 */
public record Readings(
    boolean beamBlanked,
    boolean valveClosed,
    boolean highVoltageOn,
    Optional<Conditions> conditions,
    Point stage) {}
