package beamwarden.system.bad.left;

import java.sql.SQLException;
import java.util.List;
import tools.jackson.databind.json.JsonMapper;

/** Shows libraries to whoever calls it. */
public final class ShowsLibraries {
  /** Shows a library's type. */
  public JsonMapper mapper() {
    return new JsonMapper();
  }

  /** Shows one inside another type. */
  public List<JsonMapper[]> mappers() {
    return List.of();
  }

  /** Shows an exception of the databases. */
  public void save(String text) throws SQLException {
    if (text.isEmpty()) {
      throw new SQLException("nothing to save");
    }
  }

  JsonMapper hidden() {
    return new JsonMapper();
  }
}
