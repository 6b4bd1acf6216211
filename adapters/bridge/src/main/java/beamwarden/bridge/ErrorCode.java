package beamwarden.bridge;

/** Why an adapter ends a connection: the codes of JSON-RPC 2.0, and three of our own. */
enum ErrorCode {
  NOT_JSON(-32700),
  NOT_A_MESSAGE(-32600),
  UNKNOWN_METHOD(-32601),
  WRONG_PARAMETERS(-32602),
  ADAPTER_FAILED(-32603),
  NOT_GREETED(-32001),
  OTHER_PROTOCOL(-32002),
  REPLACED(-32003);

  private final int number;

  ErrorCode(int number) {
    this.number = number;
  }

  int number() {
    return number;
  }
}
