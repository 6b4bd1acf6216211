package beamwarden.bridge;

import static java.nio.charset.StandardCharsets.UTF_8;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.instrument.InstrumentEvent;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.HashSet;
import java.util.List;
import java.util.Set;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.MethodSource;

class MessagesTest {
  private static final Path GOLDEN = Path.of("src/test/resources/beamwarden/bridge/messages");

  static Set<String> names() {
    return Examples.messages().keySet();
  }

  @ParameterizedTest
  @MethodSource("names")
  void keepsTheFormOfEveryMessage(String name) throws IOException, MalformedMessage {
    Message message = Examples.messages().get(name);
    String golden = Files.readString(GOLDEN.resolve(name + ".json"));
    assertEquals(golden, new String(Messages.write(message), UTF_8) + "\n");
    assertEquals(message, Messages.read(golden.trim().getBytes(UTF_8)));
  }

  @Test
  void hasNoGoldenFileThatNothingChecks() throws IOException {
    try (Stream<Path> files = Files.list(GOLDEN)) {
      assertEquals(
          names(),
          files
              .map(file -> file.getFileName().toString().replace(".json", ""))
              .collect(Collectors.toSet()));
    }
  }

  @Test
  void hasAnExampleOfEveryMethodAndEveryEvent() {
    Set<Class<?>> shown = new HashSet<>();
    Examples.calls().values().forEach(call -> shown.add(call.getClass()));
    Examples.events().values().forEach(event -> shown.add(event.getClass()));
    for (Method method : Method.values()) {
      assertTrue(shown.contains(method.parameters()), method.text());
    }
    for (Class<?> event : InstrumentEvent.class.getPermittedSubclasses()) {
      assertTrue(shown.contains(event), event.getSimpleName());
    }
  }

  @Test
  void writesEveryMessageOnOneLine() {
    Message message = new Message.Told(new InstrumentEvent.Lost("first\nsecond\r\n"));
    List<String> lines = new String(Messages.write(message), UTF_8).lines().toList();
    assertEquals(1, lines.size());
  }

  @ParameterizedTest
  @CsvSource(
      delimiter = '|',
      quoteCharacter = '`',
      textBlock =
          """
          ``|NOT_JSON
          {|NOT_JSON
          {"jsonrpc":"2.0","jsonrpc":"2.0","id":1,"method":"connect"}|NOT_JSON
          {"jsonrpc":"2.0","id":1,"method":"connect"} {}|NOT_JSON
          []|NOT_A_MESSAGE
          [{"jsonrpc":"2.0","id":1,"method":"connect"}]|NOT_A_MESSAGE
          {"id":1,"method":"connect"}|NOT_A_MESSAGE
          {"jsonrpc":"1.0","id":1,"method":"connect"}|NOT_A_MESSAGE
          {"jsonrpc":"2.0","id":"1","method":"connect"}|NOT_A_MESSAGE
          {"jsonrpc":"2.0","id":1.5,"method":"connect"}|NOT_A_MESSAGE
          {"jsonrpc":"2.0","id":1,"method":"connect","more":1}|NOT_A_MESSAGE
          {"jsonrpc":"2.0","id":1}|NOT_A_MESSAGE
          {"jsonrpc":"2.0","result":{"accepted":true}}|NOT_A_MESSAGE
          {"jsonrpc":"2.0","id":1,"result":{"accepted":false}}|NOT_A_MESSAGE
          {"jsonrpc":"2.0","id":1,"result":null}|NOT_A_MESSAGE
          {"jsonrpc":"2.0","id":1,"result":{"accepted":true,"protocol":"1"}}|NOT_A_MESSAGE
          {"jsonrpc":"2.0","id":1,"result":{"accepted":true},"error":{"code":1,"message":""}}|NOT_A_MESSAGE
          {"jsonrpc":"2.0","id":1,"error":{"code":"1","message":""}}|NOT_A_MESSAGE
          {"jsonrpc":"2.0","id":1,"error":{"code":1}}|NOT_A_MESSAGE
          {"jsonrpc":"2.0","id":1,"method":"expose"}|UNKNOWN_METHOD
          {"jsonrpc":"2.0","id":1,"method":7}|UNKNOWN_METHOD
          {"jsonrpc":"2.0","method":"bye"}|UNKNOWN_METHOD
          {"jsonrpc":"2.0","id":1,"method":"measure"}|WRONG_PARAMETERS
          {"jsonrpc":"2.0","id":1,"method":"measure","params":null}|WRONG_PARAMETERS
          {"jsonrpc":"2.0","id":1,"method":"measure","params":[2]}|WRONG_PARAMETERS
          {"jsonrpc":"2.0","id":1,"method":"measure","params":{"request":2,"slowly":true}}|WRONG_PARAMETERS
          {"jsonrpc":"2.0","id":1,"method":"wind-down","params":{"park":true}}|WRONG_PARAMETERS
          {"jsonrpc":"2.0","method":"event"}|WRONG_PARAMETERS
          {"jsonrpc":"2.0","method":"event","params":{"event":"exploded"}}|WRONG_PARAMETERS
          {"jsonrpc":"2.0","method":"event","params":{"event":"begun"}}|WRONG_PARAMETERS
          """)
  void refusesALineThatIsNoMessage(String line, ErrorCode code) {
    MalformedMessage refused =
        assertThrows(MalformedMessage.class, () -> Messages.read(line.getBytes(UTF_8)));
    assertEquals(code.number(), refused.refusal().code(), refused.getMessage());
    assertFalse(refused.getMessage().contains("\n"), refused.getMessage());
  }

  @Test
  void saysWhereParametersAreWrong() {
    MalformedMessage refused =
        assertThrows(
            MalformedMessage.class,
            () ->
                Messages.read(
                    ("{\"jsonrpc\":\"2.0\",\"method\":\"event\",\"params\":{\"event\":\"trouble\","
                            + "\"fault\":{\"kind\":\"fire\",\"message\":\"hot\"}}}")
                        .getBytes(UTF_8)));
    assertTrue(
        refused.getMessage().startsWith("wrong params of event at fault.kind: "),
        refused.getMessage());
  }

  @Test
  void refusesBytesThatAreNotUtf8() {
    byte[] line = "{\"jsonrpc\":\"2.0\",\"id\":1,\"method\":\"?\"}".getBytes(UTF_8);
    line[line.length - 3] = (byte) 0xff;
    MalformedMessage refused = assertThrows(MalformedMessage.class, () -> Messages.read(line));
    assertEquals(ErrorCode.NOT_JSON.number(), refused.refusal().code());
  }

  @Test
  void takesParametersThatAreNoneAsLeftOut() throws MalformedMessage {
    String line = "{\"jsonrpc\":\"2.0\",\"id\":1,\"method\":\"connect\",\"params\":{}}";
    assertEquals(new Message.Request(1, new Call.Connect()), Messages.read(line.getBytes(UTF_8)));
  }
}
