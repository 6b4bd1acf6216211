package beamwarden.bridge;

import java.util.Optional;

/** The names of the methods, as they stand in messages. */
enum Method {
  HELLO("hello", Call.Hello.class),
  CONNECT("connect", Call.Connect.class),
  SEAL("seal", Call.Seal.class),
  PREPARE("prepare", Call.Prepare.class),
  MEASURE("measure", Call.Measure.class),
  BEGIN("begin", Call.Begin.class),
  STOP("stop", Call.Stop.class),
  HEARTBEAT("heartbeat", Call.Heartbeat.class),
  ACKNOWLEDGE("acknowledge", Call.Acknowledge.class),
  WIND_DOWN("wind-down", Call.WindDown.class),
  BYE("bye", Call.Bye.class);

  private final String text;
  private final Class<? extends Call> parameters;

  Method(String text, Class<? extends Call> parameters) {
    this.text = text;
    this.parameters = parameters;
  }

  String text() {
    return text;
  }

  Class<? extends Call> parameters() {
    return parameters;
  }

  static Method of(Call call) {
    for (Method method : values()) {
      if (method.parameters == call.getClass()) {
        return method;
      }
    }
    throw new IllegalArgumentException("no method carries " + call);
  }

  static Optional<Method> named(String text) {
    for (Method method : values()) {
      if (method.text.equals(text)) {
        return Optional.of(method);
      }
    }
    return Optional.empty();
  }
}
