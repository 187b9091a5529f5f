package org.hazewright.cli;

import java.io.PrintWriter;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Collection;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.concurrent.Callable;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import org.hazewright.desk.Opening;
import org.hazewright.files.FaultReport;
import org.hazewright.files.WriteFailure;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Nearest;
import picocli.CommandLine;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** The program: without a command it opens the window, with one it does that and ends with a status. */
@Command(
        name = "hazewright",
        description = "Recipes for tissue phantoms: from wanted µa and µs' to grams on a balance.",
        versionProvider = Hazewright.Version.class,
        synopsisSubcommandLabel = "COMMAND",
        subcommands = {
            DesignCommand.class,
            SeriesCommand.class,
            PredictCommand.class,
            ReadingsCommand.class,
            IngredientsCommand.class,
            BatchCommand.class,
            CorrectCommand.class,
            LotCommand.class,
            TargetsCommand.class,
            ParticlesCommand.class,
        },
        footer = {
            "",
            "Exit status: 0 done; 2 input refused; 3 done, but no recipe from this shelf meets every",
            "tolerance (the closest is still written); 4 output could not be written.",
        })
public final class Hazewright implements Callable<Integer> {
    /** Exit statuses; 1 is a fault of the program itself. */
    static final int DONE = 0;

    static final int FAULT = 1;
    static final int REFUSED = 2;
    static final int MISSES = 3;
    static final int UNWRITABLE = 4;

    final Interruption interruption;

    Hazewright(Interruption interruption) {
        this.interruption = interruption;
    }

    @Spec
    private CommandSpec spec;

    @Option(
            names = {"-h", "--help"},
            usageHelp = true,
            description = "Show this help and end.")
    @SuppressWarnings("unused") // the parser asks it
    private boolean help;

    @Option(
            names = {"-V", "--version"},
            versionHelp = true,
            description = "Show the version and end.")
    @SuppressWarnings("unused") // the parser asks it
    private boolean version;

    @Option(
            names = "--ingredients",
            paramLabel = "DIR",
            description =
                    "Shelf for the window (default: the folder ingredients here, else the shelf that comes with the program).")
    private Path ingredients;

    @Parameters(
            arity = "0..1",
            paramLabel = "FILE",
            description = "A brief, recipe or batch (.toml) to open in the window.")
    private Path file;

    /** Without a command: opens the window. */
    @Override
    public Integer call() {
        if (file != null && !file.toString().endsWith(".toml"))
            throw new CommandLine.ParameterException(spec.commandLine(), noCommand());
        if (file != null && !Files.isRegularFile(file))
            throw new Refusal("There is no file " + file + "; name a brief, a recipe or a batch.");
        Shared shelf = new Shared();
        shelf.ingredients = ingredients;
        return Opening.open(Optional.ofNullable(shelf.shelfFolder()), Optional.ofNullable(file));
    }

    private String noCommand() {
        return "There is no command \"" + file + "\"."
                + perhaps(file.toString(), spec.subcommands().keySet());
    }

    private static String perhaps(String word, Collection<String> known) {
        return Nearest.to(word, known).map(n -> " Perhaps " + n + " is meant.").orElse("");
    }

    public static void main(String[] args) {
        PrintWriter out = new PrintWriter(System.out, false, StandardCharsets.UTF_8);
        PrintWriter err = new PrintWriter(System.err, true, StandardCharsets.UTF_8);
        Interruption interruption = Interruption.atTerminal();
        int status = run(out, err, interruption, args);
        out.flush();
        err.flush();
        interruption.finished(status);
        System.exit(out.checkError() && status == DONE ? UNWRITABLE : status);
    }

    /** Runs one command line against the given writers and gives its exit status. */
    static int run(PrintWriter out, PrintWriter err, String... args) {
        return run(out, err, new Interruption(), args);
    }

    /** The same; long work ends early once {@code interruption} is asked for. */
    static int run(PrintWriter out, PrintWriter err, Interruption interruption, String... args) {
        CommandLine line = new CommandLine(new Hazewright(interruption))
                .setOut(out)
                .setErr(err)
                .setColorScheme(CommandLine.Help.defaultColorScheme(CommandLine.Help.Ansi.OFF))
                .setUsageHelpWidth(100)
                .setCaseInsensitiveEnumValuesAllowed(true)
                .registerConverter(Double.class, Hazewright::number)
                .registerConverter(double.class, Hazewright::number)
                .setParameterExceptionHandler((problem, given) -> {
                    err.println("hazewright: " + plain(problem));
                    return REFUSED;
                })
                .setExecutionExceptionHandler((problem, command, parsed) -> status(problem, err));
        int status;
        try {
            status = line.execute(args);
        } catch (OutOfMemoryError | StackOverflowError tooMuch) {
            err.println(
                    "hazewright: this needs more memory than the program has; nothing was overwritten. Ask for less, or give it"
                            + " more: java -Xmx4g -jar …");
            status = FAULT;
        }
        out.flush();
        err.flush();
        return status;
    }

    private static Double number(String text) {
        try {
            return Double.valueOf(text);
        } catch (NumberFormatException e) {
            throw new CommandLine.TypeConversionException("'" + text
                    + "' is not a number; write digits with a decimal point and without a unit, such as 0.3");
        }
    }

    /** Says what went wrong, in words for a person, and gives its exit status. */
    static int status(Exception problem, PrintWriter err) {
        if (problem instanceof WriteFailure) {
            err.println("hazewright: " + problem.getMessage());
            return UNWRITABLE;
        }
        if (problem instanceof Refusal) {
            err.println("hazewright: " + problem.getMessage());
            return REFUSED;
        }
        err.println("hazewright: " + FaultReport.of(problem));
        return FAULT;
    }

    /** The worse of two statuses: a fault before what could not be written, was refused, or misses. */
    static int worse(int one, int other) {
        List<Integer> order = List.of(DONE, MISSES, REFUSED, UNWRITABLE, FAULT);
        return order.indexOf(one) >= order.indexOf(other) ? one : other;
    }

    private static final Pattern CANNOT_CONVERT =
            Pattern.compile("(?s)(.*?): cannot convert '(.*)' to (?:interface |class )?(\\S+) \\(.*\\)");

    private static String kind(String type) {
        return type.endsWith("Path")
                ? "the name of a file"
                : type.endsWith("LocalDate") ? "a date such as 2026-03-02" : "a value for it";
    }

    /** Picocli's message without its bracketed details, with the word that was perhaps meant, and where to look. */
    private static String plain(CommandLine.ParameterException problem) {
        CommandSpec command = problem.getCommandLine().getCommandSpec();
        String text = problem.getMessage().strip();
        Matcher unread = CANNOT_CONVERT.matcher(text);
        if (unread.matches())
            text = unread.group(1) + ": '" + unread.group(2) + "' is not " + kind(unread.group(3)) + ".";
        if (problem instanceof CommandLine.UnmatchedArgumentException unmatched) text = unmatched(unmatched, command);
        return text + (text.endsWith(".") ? "" : ".") + " See: " + command.qualifiedName() + " --help";
    }

    private static String unmatched(CommandLine.UnmatchedArgumentException problem, CommandSpec command) {
        String word = problem.getUnmatched().get(0);
        if (word.startsWith("-"))
            return "There is no option " + word + "."
                    + perhaps(word, command.optionsMap().keySet());
        if (command.userObject() instanceof Hazewright top && top.file != null) return top.noCommand();
        if (!command.subcommands().isEmpty())
            return "There is no command \"" + word + "\"."
                    + perhaps(word, command.subcommands().keySet());
        return "\"" + word + "\" is one word too many.";
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
