package beamwarden.bridge;

import beamwarden.instrument.InstrumentEvent;
import java.util.Optional;
import java.util.OptionalInt;
import java.util.OptionalLong;
import java.util.Set;
import java.util.stream.Collectors;
import tools.jackson.core.JacksonException;
import tools.jackson.databind.JsonNode;
import tools.jackson.databind.json.JsonMapper;
import tools.jackson.databind.node.ObjectNode;

/** Reads and writes the lines of a connection: JSON-RPC 2.0 without batches. */
final class Messages {
  /** The version of these messages; raised by whatever an older reader must not pass over. */
  static final int PROTOCOL = 1;

  private static final String VERSION = "2.0";
  private static final String EVENT = "event";
  private static final int LONGEST_REASON = 300;
  private static final Set<String> REQUEST_KEYS = Set.of("jsonrpc", "id", "method", "params");
  private static final Set<String> ANSWER_KEYS = Set.of("jsonrpc", "id", "result", "error");
  private static final JsonMapper JSON = ContractJson.mapper();

  private Messages() {}

  /** The line of a message, without its end. */
  static byte[] write(Message message) {
    ObjectNode line = JSON.createObjectNode().put("jsonrpc", VERSION);
    if (message instanceof Message.Request request) {
      line.put("id", request.id()).put("method", Method.of(request.call()).text());
      JsonNode parameters = JSON.valueToTree(request.call());
      if (!parameters.isEmpty()) {
        line.set("params", parameters);
      }
    } else if (message instanceof Message.Accepted accepted) {
      ObjectNode result = line.put("id", accepted.id()).putObject("result").put("accepted", true);
      accepted.protocol().ifPresent(protocol -> result.put("protocol", protocol));
    } else if (message instanceof Message.Refused refused) {
      refused.id().ifPresentOrElse(id -> line.put("id", id), () -> line.putNull("id"));
      line.putObject("error").put("code", refused.code()).put("message", refused.text());
    } else if (message instanceof Message.Told told) {
      line.put("method", EVENT);
      line.set("params", JSON.valueToTree(told.event()));
    }
    return JSON.writeValueAsBytes(line);
  }

  /** The message of a line. */
  static Message read(byte[] line) throws MalformedMessage {
    JsonNode node = parsed(line);
    if (node.isMissingNode()) {
      throw new MalformedMessage(ErrorCode.NOT_JSON, "a line is empty");
    }
    if (!node.isObject() || !VERSION.equals(node.path("jsonrpc").stringValue(""))) {
      throw notAMessage("a message is an object with \"jsonrpc\":\"2.0\"");
    }
    return node.has("method") ? asked(node) : answered(node);
  }

  private static JsonNode parsed(byte[] line) throws MalformedMessage {
    try {
      return JSON.readTree(line);
    } catch (JacksonException e) {
      throw new MalformedMessage(
          ErrorCode.NOT_JSON, "a line is not one JSON value in UTF-8: " + reason(e));
    }
  }

  private static Message asked(JsonNode node) throws MalformedMessage {
    onlyKeys(node, REQUEST_KEYS);
    String name = node.get("method").stringValue("");
    if (!node.has("id")) {
      if (!name.equals(EVENT)) {
        throw new MalformedMessage(
            ErrorCode.UNKNOWN_METHOD, "there is no notification called '" + shortened(name) + "'");
      }
      return new Message.Told(
          converted(node.path("params"), InstrumentEvent.class, OptionalLong.empty(), EVENT));
    }
    long id = wholeNumber(node.get("id"));
    Optional<Method> method = Method.named(name);
    if (method.isEmpty()) {
      throw new MalformedMessage(
          ErrorCode.UNKNOWN_METHOD,
          OptionalLong.of(id),
          "there is no method called '" + shortened(name) + "'");
    }
    JsonNode parameters = node.has("params") ? node.get("params") : JSON.createObjectNode();
    return new Message.Request(
        id, converted(parameters, method.get().parameters(), OptionalLong.of(id), name));
  }

  private static Message answered(JsonNode node) throws MalformedMessage {
    onlyKeys(node, ANSWER_KEYS);
    if (!node.has("id") || node.has("result") == node.has("error")) {
      throw notAMessage("an answer has an id and either a result or an error");
    }
    JsonNode id = node.get("id");
    if (node.has("error")) {
      OptionalLong request = id.isNull() ? OptionalLong.empty() : OptionalLong.of(wholeNumber(id));
      JsonNode error = node.get("error");
      if (!error.path("code").canConvertToInt() || !error.path("message").isString()) {
        throw notAMessage("an error has a code and a message");
      }
      return new Message.Refused(
          request, error.get("code").intValue(), shortened(error.get("message").stringValue()));
    }
    return accepted(wholeNumber(id), node.get("result"));
  }

  private static Message accepted(long id, JsonNode result) throws MalformedMessage {
    if (!result.path("accepted").booleanValue(false)) {
      throw notAMessage("a result says \"accepted\":true; anything else is an error");
    }
    JsonNode protocol = result.path("protocol");
    if (protocol.isMissingNode()) {
      return new Message.Accepted(id, OptionalInt.empty());
    }
    if (!protocol.isIntegralNumber() || !protocol.canConvertToInt()) {
      throw notAMessage("a protocol is a whole number");
    }
    return new Message.Accepted(id, OptionalInt.of(protocol.intValue()));
  }

  private static <T> T converted(JsonNode node, Class<T> type, OptionalLong id, String name)
      throws MalformedMessage {
    try {
      T value = JSON.treeToValue(node, type);
      if (value != null) {
        return value;
      }
    } catch (JacksonException e) {
      throw new MalformedMessage(
          ErrorCode.WRONG_PARAMETERS, id, "wrong params of " + name + where(e) + ": " + reason(e));
    }
    throw new MalformedMessage(
        ErrorCode.WRONG_PARAMETERS, id, "the params of " + name + " are missing");
  }

  private static void onlyKeys(JsonNode node, Set<String> allowed) throws MalformedMessage {
    for (String key : node.propertyNames()) {
      if (!allowed.contains(key)) {
        throw notAMessage("there is no place for '" + shortened(key) + "' in a message");
      }
    }
  }

  private static long wholeNumber(JsonNode id) throws MalformedMessage {
    if (!id.isIntegralNumber() || !id.canConvertToLong()) {
      throw notAMessage("an id is a whole number");
    }
    return id.longValue();
  }

  private static MalformedMessage notAMessage(String sentence) {
    return new MalformedMessage(ErrorCode.NOT_A_MESSAGE, sentence);
  }

  private static String where(JacksonException e) {
    String path =
        e.getPath().stream()
            .map(
                part ->
                    part.getPropertyName() == null ? "" + part.getIndex() : part.getPropertyName())
            .collect(Collectors.joining("."));
    return path.isEmpty() ? "" : " at " + shortened(path);
  }

  private static String reason(JacksonException e) {
    return shortened(String.valueOf(e.getOriginalMessage()));
  }

  /** At most so much of a text from elsewhere, on one line. */
  static String shortened(String text) {
    String line = text.replaceAll("\\p{Cntrl}+", " ");
    return line.length() <= LONGEST_REASON ? line : line.substring(0, LONGEST_REASON) + "...";
  }
}
