package beamwarden.document;

import beamwarden.profile.Profile;
import java.nio.file.Path;

/** Reads instrument profiles, in YAML or JSON; all problems of a profile are told at once. */
public final class ProfileDocuments {
  private ProfileDocuments() {}

  /** Reads a profile from a file. */
  public static Reading<Profile> read(Path file) {
    return Documents.read(file, ProfileDocuments::read);
  }

  /** Reads a profile from a text; {@code name} stands for the file in problems. */
  public static Reading<Profile> read(String name, String text) {
    Problems problems = new Problems(name);
    return problems.reading(
        Documents.tree(text, problems).flatMap(top -> new ProfileReader(problems).read(top)));
  }
}
