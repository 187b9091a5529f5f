package org.hazewright.cli;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Map;
import org.hazewright.files.SafeFile;
import picocli.AutoComplete;
import picocli.CommandLine;
import picocli.CommandLine.Help;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Model.OptionSpec;
import picocli.CommandLine.Model.PositionalParamSpec;

/**
 * The man page and the completion for the shell, made of what the commands say of themselves; the installer runs it.
 *
 * <p>{@code java -cp hazewright.jar org.hazewright.cli.Manual FOLDER} writes {@code hazewright.1} and {@code hazewright.bash}.
 */
final class Manual {
    private final StringBuilder out = new StringBuilder();

    private Manual() {}

    public static void main(String[] args) throws IOException {
        Path folder = Files.createDirectories(Path.of(args[0]));
        SafeFile.write(folder.resolve("hazewright.1"), page(), SafeFile.Overwrite.REPLACE);
        SafeFile.write(folder.resolve("hazewright.bash"), completion(), SafeFile.Overwrite.REPLACE);
    }

    private static CommandLine line() {
        return new CommandLine(new Hazewright(new Interruption()))
                .setColorScheme(Help.defaultColorScheme(Help.Ansi.OFF));
    }

    static String completion() {
        return AutoComplete.bash("hazewright", line());
    }

    /** In the man macros that every Unix has. */
    static String page() {
        Manual m = new Manual();
        CommandLine top = line();
        m.out.append(".TH HAZEWRIGHT 1\n.SH NAME\n");
        m.text("hazewright - " + sentence(top.getCommandSpec()));
        m.out.append(".SH SYNOPSIS\n.nf\n");
        m.text("hazewright [FILE]\nhazewright COMMAND …");
        m.out.append(".fi\n.SH DESCRIPTION\n");
        m.text(
                "Without a command it opens the window. Files that it reads are UTF-8 TOML or CSV; it writes recipes beside the brief.");
        m.out.append(".SH COMMANDS\n");
        m.commands("", top);
        m.out.append(".SH EXIT STATUS\n");
        for (String foot : top.getCommandSpec().usageMessage().footer()) if (!foot.isBlank()) m.text(foot);
        return m.out.toString();
    }

    private void commands(String before, CommandLine line) {
        for (Map.Entry<String, CommandLine> e : line.getSubcommands().entrySet()) {
            String name = (before + " " + e.getKey()).strip();
            CommandSpec spec = e.getValue().getCommandSpec();
            out.append(".SS ");
            text(name);
            text(sentence(spec));
            for (PositionalParamSpec p : spec.positionalParameters()) item(p.paramLabel(), p.description());
            for (OptionSpec o : spec.options()) {
                boolean valued = o.arity().max() > 0;
                item(String.join(", ", o.names()) + (valued ? " " + o.paramLabel() : ""), o.description());
            }
            commands(name, e.getValue());
        }
    }

    private static String sentence(CommandSpec spec) {
        return formatted(spec.usageMessage().description());
    }

    private static String formatted(String[] lines) {
        return String.join(" ", lines).replace("%n", " ").replace("%%", "%");
    }

    private void item(String what, String[] description) {
        out.append(".TP\n\\fB");
        text(what.concat("\\fR"), false);
        text(formatted(description));
    }

    private void text(String text) {
        text(text, true);
    }

    /** Backslashes, hyphens and lines that begin with a dot would be taken for commands of the page. */
    private void text(String text, boolean escaped) {
        String plain = escaped ? text.replace("\\", "\\e") : text;
        for (String l : plain.replace("-", "\\-").lines().toList())
            out.append(l.startsWith(".") || l.startsWith("'") ? "\\&" : "")
                    .append(l)
                    .append('\n');
    }
}
