package org.hazewright.files;

import org.hazewright.optics.Refusal;

/**
 * A file that cannot be used, said once: "path:line:column: what was found; what is allowed; how to mend it."
 *
 * <p>Lines and columns count from 1, columns in characters; both are 0 when the complaint is about the file as a whole, and then
 * the message begins with the path alone.
 */
public final class FileRefusal extends Refusal {
    private final String path;
    private final int line;
    private final int column;

    public FileRefusal(String path, int line, int column, String complaint) {
        this(path, line, column, complaint, null);
    }

    public FileRefusal(String path, int line, int column, String complaint, Throwable cause) {
        super(path + (line > 0 ? ":" + line + ":" + column : "") + ": " + complaint, cause);
        this.path = path;
        this.line = line;
        this.column = column;
    }

    /** The file, as the person named it. */
    public String path() {
        return path;
    }

    public int line() {
        return line;
    }

    public int column() {
        return column;
    }
}
