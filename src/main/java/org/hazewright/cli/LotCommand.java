package org.hazewright.cli;

import java.nio.file.Path;
import java.util.Optional;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Lot;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.ParameterException;
import picocli.CommandLine.Spec;

/** What a measurement makes of a bottle. */
@Command(
        name = "lot",
        description = "A lot file from a dilution series, or from measured batches.",
        synopsisSubcommandLabel = "COMMAND",
        subcommands = {LotFitCommand.class, LotUpdateCommand.class})
final class LotCommand implements Runnable {
    @Spec
    private CommandSpec spec;

    @Option(names = "--help", usageHelp = true, description = "Show this help and end.")
    @SuppressWarnings("unused") // the parser asks it
    private boolean help;

    @Override
    public void run() {
        throw new ParameterException(spec.commandLine(), "Say what to do: fit or update.");
    }

    static Path folder(Path out, Shared shared) {
        if (out != null) return out;
        if (shared.shelfFolder() != null) return shared.shelfFolder();
        throw new Refusal(
                "The shelf that comes with the program cannot be written to; say --out DIR, or --ingredients with a"
                        + " shelf of your own.");
    }

    /** The number of a lot whose file is written anew. */
    static Lot lot(Ingredient of, String number) {
        Optional<Lot> old = of.lot();
        return new Lot(
                of.kind(), number, old.flatMap(Lot::received), old.flatMap(Lot::opened), old.flatMap(Lot::expires));
    }
}
