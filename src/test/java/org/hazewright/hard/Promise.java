package org.hazewright.hard;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.regex.Pattern;
import java.util.stream.Stream;
import org.hazewright.optics.Refusal;

/** What holds for every input: a value, or one refusal in words for a person; and no file left half-written. */
final class Promise {
    /** What a person should never have to read: names of classes, of packages, of nothing. */
    private static final Pattern MACHINE = Pattern.compile(
            "(?s).*(Exception|java\\.|org\\.|\\bnull\\b|\\bError:|\\tat |@[0-9a-f]{6,}|OptionalDouble).*");

    private static final int LONGEST = 20_000;

    private Promise() {}

    /** Runs a reading; anything thrown but a well-said refusal is a finding. */
    static void refusesAtMost(Runnable reading, String input) {
        try {
            reading.run();
        } catch (Refusal refusal) {
            wellSaid(refusal.getMessage(), input);
        }
    }

    /** {@code input} is taken out first: a message may quote what was found. */
    static void wellSaid(String message, String input) {
        if (message == null || message.isBlank()) throw new AssertionError("A refusal without words.");
        if (message.length() > LONGEST) throw new AssertionError("A refusal of " + message.length() + " characters.");
        String end = message.strip();
        if (":,;(".indexOf(end.charAt(end.length() - 1)) >= 0)
            throw new AssertionError("A refusal that breaks off: " + message);
        if (MACHINE.matcher(message).matches() && !MACHINE.matcher(input).matches() && !input.contains("null"))
            throw new AssertionError("A refusal in the words of a machine: " + message);
    }

    /** Refuses a folder in which a write left its temporary file. */
    static void nothingHalfWritten(Path folder) {
        try (Stream<Path> all = Files.walk(folder)) {
            List<Path> parts = all.filter(p -> p.getFileName().toString().endsWith(".part"))
                    .toList();
            if (!parts.isEmpty()) throw new AssertionError("Left half-written: " + parts);
        } catch (IOException e) {
            throw new AssertionError(e);
        }
    }
}
