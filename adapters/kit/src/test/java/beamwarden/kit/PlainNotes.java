package beamwarden.kit;

import beamwarden.instrument.Receipt;
import java.util.HashMap;
import java.util.HashSet;
import java.util.Map;
import java.util.Set;

/** What a plain instrument would keep on disk: outlives it, and knows nothing at first. */
final class PlainNotes {
  long fence;
  String store = "";
  final Set<String> begun = new HashSet<>();
  final Map<String, Receipt> receipts = new HashMap<>();

  static String key(String store, long grant) {
    return store + "/" + grant;
  }
}
