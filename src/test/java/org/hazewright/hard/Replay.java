package org.hazewright.hard;

import java.io.IOException;
import java.io.PrintWriter;
import java.io.StringWriter;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Random;

/**
 * Opens every {@link Door} with its seeds, with every case that was ever found, and with seeded changes of the seeds.
 *
 * <p>{@code Replay FOUND ROUNDS SEED}, in a folder laid by {@link Seeds}; prints what broke the promise and exits with 1 if anything
 * did. Run in a Java machine of its own, for its own memory bound.
 */
final class Replay {
    private static final String[] PIECES = {
        "\"",
        "[",
        "]",
        "[[",
        "{",
        "=",
        ",",
        "#",
        "\n",
        "-",
        "1e400",
        "nan",
        "0x1",
        "99999999999999999999",
        "-1",
        "0",
        "\u0000",
        "µ",
        "\uFEFF",
        "..",
        "1e-320",
        "<",
        "/>",
        "&amp;",
        "<!DOCTYPE a>",
        "--json",
        "--at",
        "1979-05-27"
    };

    private Replay() {}

    public static void main(String[] args) throws IOException {
        Path things = Path.of("");
        int rounds = Integer.parseInt(args[1]);
        Random random = new Random(Long.parseLong(args[2]));
        int broken = 0;
        for (Door door : Door.values()) {
            List<Path> seeds = door.seeds(things);
            if (seeds.isEmpty()) throw new IllegalStateException(door + " has no seeds");
            for (Path found : Seeds.files(Path.of(args[0]).resolve(door.word())))
                broken += open(door, things, Files.readAllBytes(found));
            for (int i = 0; i < rounds; i++) {
                byte[] seed = Files.readAllBytes(seeds.get(i % seeds.size()));
                broken += open(door, things, i < seeds.size() ? seed : changed(seed, random));
            }
        }
        System.exit(broken == 0 ? 0 : 1);
    }

    private static int open(Door door, Path things, byte[] bytes) {
        try {
            door.open(things, bytes);
            return 0;
        } catch (Throwable broken) { // a StackOverflowError or an OutOfMemoryError is a finding like any other
            StringWriter trace = new StringWriter();
            broken.printStackTrace(new PrintWriter(trace));
            String input = new String(bytes, StandardCharsets.UTF_8);
            System.out.println(door + ": " + trace.toString().lines().limit(12).reduce("", (a, b) -> a + b + "\n")
                    + "with\n" + input.substring(0, Math.min(2000, input.length())));
            return 1;
        }
    }

    private static byte[] changed(byte[] seed, Random random) {
        String text = new String(seed, StandardCharsets.UTF_8);
        for (int k = 0; k <= random.nextInt(3); k++) {
            int at = random.nextInt(text.length() + 1);
            int to = Math.min(text.length(), at + random.nextInt(12));
            String piece = PIECES[random.nextInt(PIECES.length)];
            text = switch (random.nextInt(4)) {
                case 0 -> text.substring(0, at) + text.substring(to);
                case 1 -> text.substring(0, at) + piece + text.substring(to);
                case 2 -> text.substring(0, at) + piece + text.substring(at);
                default -> text.substring(0, to) + text.substring(at);
            };
        }
        return text.getBytes(StandardCharsets.UTF_8);
    }
}
