package org.hazewright.hard;

import com.sun.management.OperatingSystemMXBean;
import java.io.IOException;
import java.lang.management.ManagementFactory;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Duration;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.Random;
import java.util.concurrent.CountDownLatch;
import java.util.concurrent.FutureTask;
import javafx.application.Platform;
import javafx.stage.Stage;
import org.hazewright.batch.Batch;
import org.hazewright.brief.Point;
import org.hazewright.cli.OneLine;
import org.hazewright.desk.Window;
import org.hazewright.desk.look.Look;
import org.hazewright.desk.model.Desk;
import org.hazewright.desk.model.Remembered;
import org.hazewright.desk.model.Solving;
import org.hazewright.desk.model.Work;
import org.hazewright.files.BatchReader;
import org.hazewright.optics.Figures;
import org.hazewright.sheet.Logbook;

/**
 * A long day in one Java machine, with the window open all the time: of every ten designs nine come by the command and one from an edit in
 * the window, and after them one batch is opened, weighed and measured into the day's logbook. Every hundred designs it says how long they
 * took, by the clock and by the processor (which other work on the machine does not stretch), and how much memory is in use after a
 * collection.
 *
 * <p>{@code Day FOLDER DESIGNS BATCHES}, in a new folder within that one; exit status 0 when everything was answered, every batch stands in the logbook and memory is flat:
 * in the last tenth of the day at most a tenth and 8 MiB above the second tenth.
 */
public final class Day {
    private static final String BRIEF = """
            format = 1
            title = "Bath of the day"
            base = "water"
            batch_ml = %s
            [tolerance]
            mua = 0.05
            musp = 0.04
            [[target]]
            wavelength_nm = 690
            mua_per_cm = %s
            musp_per_cm = %s
            [[target]]
            wavelength_nm = 830
            mua_per_cm = %s
            musp_per_cm = %s
            [shelf]
            use = ["lipid-emulsion-20", "ink-demo", "dye-blue-demo"]
            """;

    private static final OperatingSystemMXBean SYSTEM =
            (OperatingSystemMXBean) ManagementFactory.getOperatingSystemMXBean();

    private final Path folder;
    private final Window window;
    private final Random random = new Random(1);
    private final List<Double> heapMib = new ArrayList<>();
    private final List<Double> designMs = new ArrayList<>();
    private final List<String> refused = new ArrayList<>();

    private Day(Path folder, Window window) {
        this.folder = folder;
        this.window = window;
    }

    public static void main(String[] args) throws Exception {
        Path folder = Files.createTempDirectory(
                Files.createDirectories(Path.of(args[0]).toAbsolutePath()), "day-");
        int designs = Integer.parseInt(args[1]);
        int batches = Integer.parseInt(args[2]);
        Day day = new Day(folder, open(folder));
        boolean good = day.live(designs, batches);
        Platform.exit();
        System.exit(good ? 0 : 1);
    }

    private static Window open(Path folder) throws Exception {
        Path first = Files.writeString(folder.resolve("window.brief.toml"), brief(1000, 0.1, 10));
        CountDownLatch up = new CountDownLatch(1);
        Platform.startup(up::countDown);
        up.await();
        Platform.setImplicitExit(false);
        return onUi(() -> {
            Remembered memory = Remembered.in(folder.resolve("settings"), folder.resolve("work"));
            Desk desk = new Desk(Work.threaded(Platform::runLater), Optional.empty(), memory);
            Window window = new Window(new Stage(), desk, new Look(), Optional.empty());
            desk.begin(Optional.of(first));
            window.show();
            return window;
        });
    }

    private boolean live(int designs, int batches) throws Exception {
        settled();
        System.out.println(
                "designs  ms/design  processor  ms/edit  batches  ms/batch  heap MiB  resident MiB  threads  files open");
        int made = 0;
        for (int hundred = 0; hundred < designs / 100; hundred++) {
            long commands = 0;
            long processor = 0;
            long edits = 0;
            long weighed = 0;
            int before = made;
            for (int n = 0; n < 100; n++) {
                long start = System.nanoTime();
                if (n % 10 == 9) {
                    edit();
                    edits += System.nanoTime() - start;
                    int due = (int) ((long) batches * (100 * hundred + n + 1) / designs);
                    start = System.nanoTime();
                    for (; made < due; made++) batch("B" + (made + 1));
                    weighed += System.nanoTime() - start;
                } else {
                    long spent = SYSTEM.getProcessCpuTime();
                    design();
                    processor += SYSTEM.getProcessCpuTime() - spent;
                    commands += System.nanoTime() - start;
                }
            }
            designMs.add(processor * 1e-6 / 90);
            heapMib.add(heapMib());
            say(
                    hundred + 1,
                    commands * 1e-6 / 90,
                    edits * 1e-6 / 10,
                    made,
                    made == before ? 0 : weighed * 1e-6 / (made - before));
        }
        return verdict(made);
    }

    private static String brief(double ml, double mua, double musp) {
        return String.format(Locale.ROOT, BRIEF, Figures.plain(ml), mua, musp, mua * 1.05, musp * 0.81);
    }

    private double between(double a, double b) {
        return a + (b - a) * random.nextDouble();
    }

    private void design() throws IOException {
        Path brief = folder.resolve("bath.brief.toml");
        Files.writeString(brief, brief(Math.rint(between(200, 2000)), between(0.05, 0.3), between(5, 20)));
        run("design", brief.toString(), "--out", folder.toString());
    }

    /** Moves a target in the window as typing does, and waits until the recipe, its curves and the other ways stand. */
    private void edit() throws Exception {
        double nm = random.nextBoolean() ? 690 : 830;
        boolean absorbs = random.nextBoolean();
        String typed = String.format(Locale.ROOT, "%.4f", absorbs ? between(0.08, 0.12) : between(8, 12));
        onUi(() -> {
            Desk desk = window.desk();
            Optional<String> wrong =
                    desk.editing().wanted(nm, absorbs ? Point.Quantity.MUA : Point.Quantity.MUSP, typed);
            wrong.ifPresent(refused::add);
            desk.editing().settle();
            return null;
        });
        settled();
    }

    private void settled() throws Exception {
        Thread.sleep(20);
        for (long end = System.nanoTime() + Duration.ofMinutes(5).toNanos(); ; Thread.sleep(5)) {
            boolean rests = onUi(() -> {
                Solving s = window.desk().solving();
                s.faultProperty().get().ifPresent(fault -> {
                    throw new IllegalStateException(fault);
                });
                return s.shownProperty().get() != null
                        && s.curvesProperty().get() != null
                        && !s.shownProperty().get().following()
                        && !s.searchingProperty().get()
                        && !s.lookingForWaysProperty().get();
            });
            if (rests) return;
            if (System.nanoTime() > end)
                throw new IllegalStateException("The window came to no recipe in five minutes.");
        }
    }

    private void batch(String id) throws IOException {
        run("batch", "open", folder.resolve("bath.recipe.toml").toString(), "--id", id, "--out", folder.toString());
        Path file = folder.resolve(id + ".batch.toml");
        Batch batch = BatchReader.read(file, Seeds.shelf());
        List<String> words = new ArrayList<>(List.of("batch", "weigh", file.toString()));
        for (int n = 0; n < batch.weighings().size(); n++) {
            double grams = batch.weighings().get(n).massG() * between(0.998, 1.002);
            words.addAll(
                    List.of("--item", Integer.toString(n + 1), "--grams", String.format(Locale.ROOT, "%.3f", grams)));
        }
        run(words.toArray(new String[0]));
        run(
                "batch",
                "measure",
                file.toString(),
                "--method",
                "slab fit",
                "--value",
                String.format(Locale.ROOT, "690,%.4f,0.002,%.3f,0.1", between(0.05, 0.3), between(5, 20)));
    }

    private void run(String... words) {
        OneLine ran = OneLine.run(words);
        // A brief of chance may have no recipe inside its tolerances (3); the closest is made all the same.
        if (ran.status() != 0 && ran.status() != 3) refused.add(String.join(" ", words) + "\n" + ran.err());
    }

    private void say(int hundreds, double msADesign, double msAnEdit, int made, double msABatch) throws IOException {
        System.out.printf(
                Locale.ROOT,
                "%7d  %9.1f  %9.1f  %7.0f  %7d  %8.0f  %8.1f  %12d  %7d  %10d%n",
                100 * hundreds,
                msADesign,
                designMs.get(designMs.size() - 1),
                msAnEdit,
                made,
                msABatch,
                heapMib.get(heapMib.size() - 1),
                residentMib(),
                Thread.activeCount(),
                filesOpen());
    }

    /** In use after collections, which also let go of what only waits to be cleaned. */
    private static double heapMib() throws InterruptedException {
        for (int k = 0; k < 3; k++) {
            System.gc();
            Thread.sleep(30);
        }
        return ManagementFactory.getMemoryMXBean().getHeapMemoryUsage().getUsed() / 1048576.0;
    }

    private static long residentMib() throws IOException {
        Path status = Path.of("/proc/self/status");
        if (!Files.exists(status)) return -1;
        return Files.readAllLines(status).stream()
                .filter(l -> l.startsWith("VmRSS"))
                .mapToLong(l -> Long.parseLong(l.replaceAll("\\D", "")) >> 10)
                .findFirst()
                .orElse(-1);
    }

    private static int filesOpen() {
        String[] open = Path.of("/proc/self/fd").toFile().list();
        return open == null ? -1 : open.length;
    }

    private boolean verdict(int made) {
        int tenth = Math.max(1, heapMib.size() / 10);
        double early =
                median(heapMib.subList(Math.min(tenth, heapMib.size() - 1), Math.min(2 * tenth, heapMib.size())));
        double late = median(heapMib.subList(heapMib.size() - tenth, heapMib.size()));
        double earlyMs =
                median(designMs.subList(Math.min(tenth, designMs.size() - 1), Math.min(2 * tenth, designMs.size())));
        double lateMs = median(designMs.subList(designMs.size() - tenth, designMs.size()));
        System.out.printf(
                Locale.ROOT,
                "Medians of the second and of the last tenth: heap %.1f and %.1f MiB, %.1f and %.1f ms of processor time a design.%n",
                early,
                late,
                earlyMs,
                lateMs);
        int recorded =
                made == 0 ? 0 : Logbook.batches(folder.resolve("logbook.xlsx")).size();
        System.out.println(recorded + " of " + made + " batches stand in the logbook; " + refused.size() + " refused.");
        refused.stream().limit(5).forEach(System.out::println);
        return recorded == made && refused.isEmpty() && late <= 1.1 * early + 8;
    }

    private static double median(List<Double> of) {
        double[] sorted = of.stream().mapToDouble(d -> d).toArray();
        Arrays.sort(sorted);
        return sorted[sorted.length / 2];
    }

    private static <T> T onUi(java.util.concurrent.Callable<T> run) throws Exception {
        FutureTask<T> task = new FutureTask<>(run);
        Platform.runLater(task);
        return task.get();
    }
}
