package org.hazewright.hard;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.File;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.List;
import java.util.TreeSet;
import java.util.regex.Pattern;
import org.junit.jupiter.api.Test;

/** The notices in the jar name every library that is packed, and none that is not. */
class ThirdPartyTest {
    /** Libraries of the tests and of profiles, which are not packed; by the beginning of their names. */
    private static final List<String> TESTS = List.of(
            "junit-",
            "opentest4j",
            "apiguardian",
            "archunit",
            "slf4j-api",
            "openjfx-monocle",
            "jimfs",
            "guava",
            "failureaccess",
            "listenablefuture",
            "jspecify",
            "jsr305",
            "checker-qual",
            "error_prone_annotations",
            "j2objc-annotations",
            "jmh-",
            "jopt-simple",
            "jazzer",
            "surefire",
            "maven-",
            "jacoco",
            "org.jacoco",
            "pitest",
            "common-");

    @Test
    void everyPackedLibraryIsNamed() throws IOException {
        String notices;
        try (var in = ThirdPartyTest.class.getResourceAsStream("/META-INF/THIRD-PARTY.txt")) {
            notices = new String(in.readAllBytes(), StandardCharsets.UTF_8);
        }
        TreeSet<String> named = new TreeSet<>();
        notices.lines()
                .dropWhile(l -> !l.startsWith("library"))
                .skip(1)
                .takeWhile(l -> !l.isBlank())
                .forEach(l -> named.addAll(Arrays.asList(l.split(" {2,}")[0].split(", "))));
        Pattern version = Pattern.compile("-\\d[\\w.]*(-linux|-mac|-win|-[a-z0-9]+)*\\.jar$");
        TreeSet<String> packed = new TreeSet<>();
        for (String entry : System.getProperty("java.class.path").split(Pattern.quote(File.pathSeparator))) {
            String jar = Path.of(entry).getFileName().toString();
            if (jar.endsWith(".jar") && TESTS.stream().noneMatch(jar::startsWith))
                packed.add(version.matcher(jar).replaceFirst(""));
        }
        assertTrue(packed.contains("poi"), packed.toString());
        assertEquals(packed, named);
    }
}
