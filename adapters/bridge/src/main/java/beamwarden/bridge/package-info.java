/**
 * Adapters as processes of their own, in any language, spoken to in JSON-RPC 2.0, one message a
 * line, over TCP on loopback or over standard streams.
 *
 * <p>Terms: the <em>daemon</em> asks ({@link beamwarden.bridge.BridgeInstrument}), the
 * <em>adapter</em> answers and tells; a <em>host</em> ({@link beamwarden.bridge.HostMain}) is a
 * process that offers an adapter written in Java; a <em>peer</em> is the other end of a connection,
 * and a {@link beamwarden.bridge.PeerStarter} finds or starts it. {@link
 * beamwarden.bridge.ContractJson} is the one JSON form of the contract's types. The messages are
 * written down in {@code ops/bridge-messages.md}.
 *
 * <p>May import {@code instrument}, {@code beam}, {@code quantity}, {@code timing}, and Jackson.
 */
package beamwarden.bridge;
