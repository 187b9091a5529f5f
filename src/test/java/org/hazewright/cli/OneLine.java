package org.hazewright.cli;

import java.io.PrintWriter;
import java.io.StringWriter;
import java.util.List;
import picocli.CommandLine;

/** One command line run in this Java machine, for tests of other packages. */
public record OneLine(int status, String out, String err) {
    public static OneLine run(String... args) {
        StringWriter out = new StringWriter();
        StringWriter err = new StringWriter();
        int status = Hazewright.run(new PrintWriter(out), new PrintWriter(err), args);
        return new OneLine(status, out.toString(), err.toString());
    }

    /** The names of the commands, in order of help. */
    public static List<String> commands() {
        return List.copyOf(new CommandLine(new Hazewright(new Interruption()))
                .getSubcommands()
                .keySet());
    }
}
