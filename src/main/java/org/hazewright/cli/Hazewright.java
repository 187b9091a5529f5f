package org.hazewright.cli;

import java.io.PrintWriter;
import java.nio.charset.StandardCharsets;
import java.util.Locale;
import org.hazewright.files.WriteFailure;
import org.hazewright.optics.Refusal;
import picocli.CommandLine;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Spec;

/** The program: without a command it opens the window, with one it does that and ends with a status. */
@Command(
        name = "hazewright",
        description = "Recipes for tissue phantoms: from wanted µa and µs' to grams on a balance.",
        mixinStandardHelpOptions = true,
        versionProvider = Hazewright.Version.class,
        synopsisSubcommandLabel = "COMMAND",
        subcommands = {
            DesignCommand.class,
            PredictCommand.class,
            IngredientsCommand.class,
            BatchCommand.class,
            CorrectCommand.class,
            ParticlesCommand.class,
        },
        footer = {
            "",
            "Exit status: 0 done; 2 input refused; 3 done, but no recipe from this shelf meets every",
            "tolerance (the closest is still written); 4 output could not be written.",
        })
public final class Hazewright implements Runnable {
    /** Exit statuses; 1 is a fault of the program itself. */
    static final int DONE = 0;

    static final int FAULT = 1;
    static final int REFUSED = 2;
    static final int MISSES = 3;
    static final int UNWRITABLE = 4;

    @Spec
    private CommandSpec spec;

    @Override
    public void run() {
        throw new CommandLine.ParameterException(
                spec.commandLine(), "Say what to do: a command is missing. Try hazewright --help.");
    }

    public static void main(String[] args) {
        PrintWriter out = new PrintWriter(System.out, false, StandardCharsets.UTF_8);
        PrintWriter err = new PrintWriter(System.err, true, StandardCharsets.UTF_8);
        int status = run(out, err, args);
        out.flush();
        err.flush();
        System.exit(out.checkError() && status == DONE ? UNWRITABLE : status);
    }

    /** Runs one command line against the given writers and gives its exit status. */
    static int run(PrintWriter out, PrintWriter err, String... args) {
        CommandLine line = new CommandLine(new Hazewright())
                .setOut(out)
                .setErr(err)
                .setColorScheme(CommandLine.Help.defaultColorScheme(CommandLine.Help.Ansi.OFF))
                .setUsageHelpWidth(100)
                .setCaseInsensitiveEnumValuesAllowed(true)
                .setParameterExceptionHandler((problem, given) -> {
                    err.println("hazewright: " + plain(problem));
                    return REFUSED;
                })
                .setExecutionExceptionHandler((problem, command, parsed) -> status(problem, err));
        int status = line.execute(args);
        out.flush();
        err.flush();
        return status;
    }

    private static int status(Exception problem, PrintWriter err) {
        if (problem instanceof WriteFailure) {
            err.println("hazewright: " + problem.getMessage());
            return UNWRITABLE;
        }
        if (problem instanceof Refusal) {
            err.println("hazewright: " + problem.getMessage());
            return REFUSED;
        }
        err.println(
                "hazewright: this is a fault of the program, not of your files; nothing was overwritten. Please report it with"
                        + " the lines below.");
        problem.printStackTrace(err);
        return FAULT;
    }

    /** Picocli's message without its bracketed details, ended with where to look. */
    private static String plain(CommandLine.ParameterException problem) {
        String text = problem.getMessage().strip();
        String command = problem.getCommandLine().getCommandSpec().qualifiedName();
        return text + (text.endsWith(".") ? "" : ".") + " See: " + command + " --help";
    }

    /** The version in the jar's manifest. */
    static final class Version implements CommandLine.IVersionProvider {
        @Override
        public String[] getVersion() {
            String version = Hazewright.class.getPackage().getImplementationVersion();
            return new String[] {"hazewright " + (version == null ? "(from source)" : version.toLowerCase(Locale.ROOT))
            };
        }
    }
}
