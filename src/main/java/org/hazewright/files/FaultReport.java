package org.hazewright.files;

import java.io.PrintWriter;
import java.io.StringWriter;
import java.nio.file.Path;
import java.time.LocalDateTime;
import java.time.format.DateTimeFormatter;
import java.util.Locale;

/** A fault of the program itself, told to a person in words; the trace that its makers need is kept in a file instead. */
public final class FaultReport {
    private static final DateTimeFormatter STAMP = DateTimeFormatter.ofPattern("yyyy-MM-dd-HHmmss-SSS", Locale.ROOT);

    private FaultReport() {}

    /** The words, after the trace has been written into the machine's folder for temporary files. */
    public static String of(Throwable fault) {
        return of(fault, Path.of(System.getProperty("java.io.tmpdir")));
    }

    static String of(Throwable fault, Path folder) {
        String words = "This is a fault of the program, not of your files; nothing was overwritten. ";
        StringWriter trace = new StringWriter();
        fault.printStackTrace(new PrintWriter(trace, true));
        Path report = folder.resolve("hazewright-fault-" + STAMP.format(LocalDateTime.now()) + ".txt");
        try {
            SafeFile.write(report, trace.toString(), SafeFile.Overwrite.NEVER);
        } catch (WriteFailure nowhere) {
            return words + "Please report it with this: "
                    + trace.toString().lines().limit(2).reduce("", String::concat);
        }
        return words + "Please report it with the file " + report + ", which says where it happened.";
    }
}
