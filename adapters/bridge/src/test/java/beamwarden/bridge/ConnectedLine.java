package beamwarden.bridge;

/** Abilities as somebody would write them by hand. */
final class ConnectedLine {
  static final String ABILITIES =
      "\"abilities\":{\"instrument\":\"north-room\",\"stage\":{\"leftMetres\":-0.025,"
          + "\"rightMetres\":0.025,\"bottomMetres\":-0.025,\"topMetres\":0.025,"
          + "\"speedMetresPerSecond\":1e-3,\"accelerationMetresPerSecondSquared\":1e-2,"
          + "\"settling\":\"PT2S\",\"repeatabilityMetres\":2e-6},"
          + "\"field\":{\"largestMetres\":5e-4,\"calibration\":0.02},"
          + "\"column\":{\"lowestVoltage\":{\"volts\":1000},\"highestVoltage\":{\"volts\":30000},"
          + "\"voltageSettling\":\"PT12M\",\"lowestCurrent\":{\"amperes\":2e-12},"
          + "\"highestCurrent\":{\"amperes\":4e-8},\"currentSettling\":\"PT2M\"},"
          + "\"meter\":{\"tolerance\":0.03,\"floor\":{\"amperes\":2e-13},\"drift\":0.1,"
          + "\"readingEvery\":\"PT1H\",\"readingTakes\":\"PT20S\"},"
          + "\"blanker\":{\"kind\":\"slow\",\"alone\":null},\"filters\":{},"
          + "\"filterChange\":\"PT4S\",\"modes\":{},\"probes\":[]}";

  private ConnectedLine() {}
}
