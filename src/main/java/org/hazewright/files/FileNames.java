package org.hazewright.files;

import java.util.regex.Pattern;

/**
 * Names that a file may have on every system, so that a folder can be taken from one to another.
 *
 * <p>Windows keeps CON, PRN, AUX, NUL, COM0–COM9 and LPT0–LPT9 for devices, with any ending, and takes no name that ends in a dot or a blank
 * (its naming conventions, from memory).
 */
public final class FileNames {
    private static final Pattern DEVICE =
            Pattern.compile("(con|prn|aux|nul|(com|lpt)[0-9¹²³])( *\\..*)?", Pattern.CASE_INSENSITIVE);

    private FileNames() {}

    /** Whether a name, with an ending put after it, is good everywhere as far as these rules go; other rules forbid characters. */
    public static boolean everywhere(String name) {
        return !DEVICE.matcher(name).matches() && !name.endsWith(".") && !name.endsWith(" ");
    }
}
