package org.hazewright.files;

import java.util.regex.Pattern;

/** Names of ingredients, materials and stocks: letters, digits, dots, hyphens and underscores, beginning with a letter or digit. */
final class Ids {
    private static final Pattern ID = Pattern.compile("[A-Za-z0-9][A-Za-z0-9._-]{0,79}");

    private Ids() {}

    /** The text of a key, which must be such a name. */
    static String require(TomlPage page, String key) {
        String id = page.text(key);
        if (!ID.matcher(id).matches())
            throw page.refusal(
                    key,
                    "The " + key + " \"" + id + "\" cannot be used; use letters, digits, dots, hyphens and underscores,"
                            + " beginning with a letter or a digit.");
        if (!FileNames.everywhere(id))
            throw page.refusal(
                    key,
                    "The " + key + " \"" + id
                            + "\" is no name for a file on every system: some keep it for a device, or"
                            + " take no dot at the end. Choose another.");
        return id;
    }

    /** The {@code id} of a file, which must be the file's name without its ending. */
    static String requireFileName(TomlPage page, String fileId) {
        String id = require(page, "id");
        if (!id.equals(fileId))
            throw page.refusal(
                    "id",
                    "The id is \"" + id + "\" and the file is called " + fileId
                            + ".toml; the two must be the same. Change one of them.");
        return id;
    }
}
