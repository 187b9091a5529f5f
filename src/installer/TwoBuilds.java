import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardCopyOption;
import java.nio.file.attribute.FileTime;
import java.security.MessageDigest;
import java.time.Duration;
import java.time.Instant;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.HexFormat;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;
import java.util.stream.Stream;

/**
 * Builds the project twice, in two folders, under two names of language and zone and with other times on the files, and compares the bytes of
 * what comes out.
 *
 * Run as `java src/installer/TwoBuilds.java [MAVEN OPTION …]` from the project's folder, for example with `-o`. Exit status 0 when every
 * artifact is the same.
 */
public final class TwoBuilds {
    private static final List<String> SOURCES = List.of("pom.xml", "src", "ingredients", "recipes-demo");
    private static final List<String> MADE =
            List.of("hazewright.jar", "hazewright-bill-of-materials.json", "hazewright-bill-of-materials.xml");

    public static void main(String[] args) throws Exception {
        Path place = Files.createTempDirectory("two-builds");
        Map<String, String> first = build(place.resolve("one"), "de_DE.UTF-8", "Pacific/Kiritimati", Duration.ofDays(400), args);
        Map<String, String> second = build(place.resolve("the second one"), "C.UTF-8", "UTC", Duration.ZERO, args);
        boolean same = true;
        for (String name : first.keySet()) {
            boolean equal = first.get(name).equals(second.get(name));
            same &= equal;
            System.out.println(name + "  sha256 " + first.get(name) + (equal ? "  twice the same" : "  and " + second.get(name)));
        }
        if (same) clear(place);
        else System.out.println("The builds differ; they are left in " + place);
        System.exit(same && first.equals(second) ? 0 : 1);
    }

    private static Map<String, String> build(Path folder, String language, String zone, Duration older, String[] options)
            throws Exception {
        for (String source : SOURCES) copy(Path.of(source), folder.resolve(source), Instant.now().minus(older));
        List<String> command = new ArrayList<>(List.of("mvn", "-q", "-B", "-Dmaven.test.skip", "package", "org.cyclonedx:cyclonedx-maven-plugin:2.9.1:makeBom",
                "-DoutputName=hazewright-bill-of-materials", "-DincludeTestScope=false", "-Dcyclonedx.skipNotDeployed=false"));
        command.addAll(List.of(options));
        ProcessBuilder builder = new ProcessBuilder(command).directory(folder.toFile()).inheritIO();
        builder.environment().putAll(Map.of("LC_ALL", language, "TZ", zone));
        int status = builder.start().waitFor();
        if (status != 0) throw new IOException("The build in " + folder + " ended with " + status);
        Map<String, String> sums = new TreeMap<>();
        for (String made : MADE) {
            Path file = folder.resolve("target").resolve(made);
            if (!Files.exists(file)) continue; // an offline build makes no bill of materials
            sums.put(made, HexFormat.of().formatHex(MessageDigest.getInstance("SHA-256").digest(Files.readAllBytes(file))));
        }
        return sums;
    }

    private static void copy(Path from, Path to, Instant time) throws IOException {
        try (Stream<Path> all = Files.walk(from)) {
            for (Path p : all.sorted().toList()) {
                Path target = to.resolve(from.relativize(p).toString());
                if (Files.isDirectory(p)) {
                    Files.createDirectories(target);
                    continue;
                }
                Files.createDirectories(target.toAbsolutePath().getParent());
                Files.copy(p, target, StandardCopyOption.REPLACE_EXISTING);
                Files.setLastModifiedTime(target, FileTime.from(time));
            }
        }
    }

    private static void clear(Path folder) throws IOException {
        try (Stream<Path> all = Files.walk(folder)) {
            for (Path p : all.sorted(Comparator.reverseOrder()).toList()) Files.delete(p);
        }
    }
}
