import java.awt.BasicStroke;
import java.awt.Color;
import java.awt.Graphics2D;
import java.awt.RenderingHints;
import java.awt.geom.Ellipse2D;
import java.awt.geom.Path2D;
import java.awt.geom.RoundRectangle2D;
import java.awt.image.BufferedImage;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardCopyOption;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.stream.Stream;
import javax.imageio.ImageIO;

/**
 * Makes what a person installs, from target/hazewright.jar: the jar under its version, an application image with its own Java, and, where
 * the system has the tools for it, a Debian package.
 *
 * Run by `mvn -Pinstaller package` as `java src/installer/Installer.java VERSION`, from the project's folder.
 */
public final class Installer {
    private static final Path OUT = Path.of("target/installer");
    private static final Path JAR = Path.of("target/hazewright.jar");

    /**
     * The most memory that a command takes. Not written as -Xmx, which tells the window to open in the machine as it is: the installed
     * window too shall start the machine that desk/OwnMachine sets up for it.
     */
    private static final String MOST_MEMORY = "-XX:MaxHeapSize=2g";

    public static void main(String[] args) throws Exception {
        String version = args[0];
        clear(OUT);
        Path input = Files.createDirectories(OUT.resolve("input"));
        Files.copy(JAR, Path.of("target/hazewright-" + version + ".jar"), StandardCopyOption.REPLACE_EXISTING);
        Files.copy(JAR, input.resolve("hazewright.jar"));
        run(tool("java"), "-cp", JAR.toString(), "org.hazewright.cli.Manual", input.toString());
        Path icon = OUT.resolve("hazewright.png");
        ImageIO.write(icon(), "png", icon.toFile());
        List<String> image = new ArrayList<>(List.of(
                tool("jpackage"), "--type", "app-image", "--name", "hazewright", "--app-version", version,
                "--input", input.toString(), "--main-jar", "hazewright.jar", "--dest", OUT.toString(),
                "--description", "Recipes for tissue phantoms", "--java-options", MOST_MEMORY,
                "--add-modules", modules(), "--jlink-options", "--strip-debug --no-header-files --no-man-pages --compress=2"));
        boolean png = System.getProperty("os.name").startsWith("Linux");
        if (png) image.addAll(List.of("--icon", icon.toString()));
        run(image.toArray(new String[0]));
        System.out.println("Application image: " + OUT.resolve("hazewright"));
        if (Files.isExecutable(Path.of("/usr/bin/dpkg-deb")) && Files.isExecutable(Path.of("/usr/bin/fakeroot"))) {
            run(tool("jpackage"), "--type", "deb", "--name", "hazewright", "--app-version", version,
                    "--app-image", OUT.resolve("hazewright").toString(), "--dest", OUT.toString(),
                    "--description", "Recipes for tissue phantoms: from wanted absorption and scattering to grams on a balance",
                    "--file-associations", "src/installer/brief.properties", "--file-associations", "src/installer/recipe.properties",
                    "--file-associations", "src/installer/batch.properties", "--resource-dir", "src/installer",
                    "--linux-shortcut", "--linux-menu-group", "Science", "--linux-app-category", "science",
                    "--linux-package-deps", "libgtk-3-0, libxxf86vm1, libgl1", "--license-file", "target/classes/META-INF/THIRD-PARTY.txt",
                    "--linux-deb-maintainer", "workshop@example.org");
            try (Stream<Path> made = Files.list(OUT)) {
                made.filter(p -> p.toString().endsWith(".deb")).forEach(p -> System.out.println("Debian package: " + p));
            }
        } else System.out.println("No Debian package: dpkg-deb and fakeroot are not here.");
    }

    /** What the jar needs of Java, and what is only found by name: archives as file systems, encodings of old workbooks. */
    private static String modules() throws Exception {
        Process jdeps = new ProcessBuilder(
                        tool("jdeps"), "--ignore-missing-deps", "--multi-release", "17", "--print-module-deps", JAR.toString())
                .redirectError(ProcessBuilder.Redirect.INHERIT)
                .start();
        String found = new String(jdeps.getInputStream().readAllBytes(), java.nio.charset.StandardCharsets.UTF_8).strip();
        if (jdeps.waitFor() != 0) throw new IOException("jdeps ended with " + jdeps.exitValue() + ": " + found);
        return found + ",jdk.zipfs,jdk.charsets";
    }

    /** The mark of icon.svg, drawn again as dots: the packager takes no SVG. */
    private static BufferedImage icon() {
        BufferedImage image = new BufferedImage(256, 256, BufferedImage.TYPE_INT_ARGB);
        Graphics2D g = image.createGraphics();
        g.setRenderingHint(RenderingHints.KEY_ANTIALIASING, RenderingHints.VALUE_ANTIALIAS_ON);
        g.setColor(new Color(0x1E2A3A));
        g.fill(new RoundRectangle2D.Double(8, 8, 240, 240, 104, 104));
        Path2D vessel = new Path2D.Double();
        vessel.moveTo(64, 84);
        vessel.lineTo(64, 180);
        vessel.quadTo(64, 208, 92, 208);
        vessel.lineTo(164, 208);
        vessel.quadTo(192, 208, 192, 180);
        vessel.lineTo(192, 84);
        vessel.closePath();
        g.setColor(new Color(0xFFFDF8));
        g.fill(vessel);
        g.setColor(new Color(0xC9820A));
        g.setStroke(new BasicStroke(12, BasicStroke.CAP_ROUND, BasicStroke.JOIN_ROUND));
        g.drawLine(128, 36, 128, 104);
        g.setColor(new Color(0x0E7C7B));
        double[][] dots = {{128, 132, 14}, {98, 156, 9}, {160, 158, 9}, {128, 178, 7}};
        for (double[] d : dots) g.fill(new Ellipse2D.Double(d[0] - d[2], d[1] - d[2], 2 * d[2], 2 * d[2]));
        g.dispose();
        return image;
    }

    private static String tool(String name) {
        return Path.of(System.getProperty("java.home"), "bin", name).toString();
    }

    private static void run(String... command) throws Exception {
        int status = new ProcessBuilder(command).inheritIO().start().waitFor();
        if (status != 0) throw new IOException(command[0] + " ended with " + status);
    }

    private static void clear(Path folder) throws IOException {
        if (Files.exists(folder))
            try (Stream<Path> all = Files.walk(folder)) {
                for (Path p : all.sorted(Comparator.reverseOrder()).toList()) Files.delete(p);
            }
        Files.createDirectories(folder);
    }
}
