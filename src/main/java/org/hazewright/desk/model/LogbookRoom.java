package org.hazewright.desk.model;

import java.nio.file.Files;
import java.nio.file.Path;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import javafx.beans.property.ReadOnlyObjectProperty;
import javafx.beans.property.ReadOnlyObjectWrapper;
import org.hazewright.sheet.Logbook;
import org.hazewright.shelf.Shelf;

/** What the logbooks hold that a person may want to see again: that of the brief's folder, and those of files used last. */
public final class LogbookRoom {
    /**
     * A batch as its row in the logbook tells it.
     *
     * @param file the batch's own file, when it is still there
     * @param landing chance and worst miss, in words; empty for a batch without a brief
     */
    public record Line(
            String batch,
            Optional<LocalDate> on,
            String title,
            String who,
            String state,
            String landing,
            String verdict,
            Optional<Path> file) {}

    /** One logbook with its batches, the latest first; {@code wrong} says why it could not be read. */
    public record Pages(Path logbook, List<Line> lines, Optional<String> wrong) {
        public Pages {
            lines = List.copyOf(lines);
        }
    }

    private final Desk desk;
    private final Work.Lane reading;
    private final ReadOnlyObjectWrapper<Optional<List<Pages>>> pages = new ReadOnlyObjectWrapper<>(Optional.empty());

    LogbookRoom(Desk desk) {
        this.desk = desk;
        reading = desk.work().lane(Work.Haste.INTERRUPT);
    }

    /** Empty while they are being read. */
    public ReadOnlyObjectProperty<Optional<List<Pages>>> pagesProperty() {
        return pages.getReadOnlyProperty();
    }

    /** Reads the logbooks again. */
    public void read() {
        pages.set(Optional.empty());
        List<Path> folders = new ArrayList<>(List.of(desk.papers().folder()));
        for (Path used : desk.remembered().recent())
            folders.add(used.toAbsolutePath().getParent());
        folders.add(desk.remembered().workFolder());
        reading.request(
                (stop, progress) -> folders.stream()
                        .map(f -> f.toAbsolutePath().normalize())
                        .distinct()
                        .map(f -> f.resolve("logbook.xlsx"))
                        .filter(Files::isRegularFile)
                        .map(LogbookRoom::pages)
                        .toList(),
                found -> pages.set(Optional.of(found)),
                failure -> desk.notices().tell(Notice.wrong("logbook", Papers.words(failure))));
    }

    private static Pages pages(Path logbook) {
        try {
            Map<String, Line> latest = new LinkedHashMap<>();
            for (Map<String, Object> row : Logbook.batches(logbook)) {
                Line line = line(row, logbook);
                latest.put(line.batch(), line);
            }
            List<Line> lines = new ArrayList<>(latest.values());
            lines.sort(Comparator.comparing((Line l) -> l.on().orElse(LocalDate.MIN))
                    .reversed());
            return new Pages(logbook, lines, Optional.empty());
        } catch (RuntimeException unreadable) {
            return new Pages(logbook, List.of(), Optional.of(Papers.words(unreadable)));
        }
    }

    private static Line line(Map<String, Object> row, Path logbook) {
        String landing = row.get("chance in 100") instanceof Double chance
                ? "lands " + Math.round(chance) + " times in 100"
                : "";
        return new Line(
                text(row, "batch"),
                row.get("date") instanceof LocalDate day ? Optional.of(day) : Optional.empty(),
                text(row, "title"),
                text(row, "who"),
                text(row, "state"),
                landing,
                text(row, "verdict"),
                file(text(row, "file"), logbook));
    }

    private static Optional<Path> file(String name, Path logbook) {
        try {
            return name.isEmpty()
                    ? Optional.empty()
                    : Optional.of(logbook.resolveSibling(name)).filter(Files::isRegularFile);
        } catch (java.nio.file.InvalidPathException strange) {
            return Optional.empty();
        }
    }

    private static String text(Map<String, Object> row, String column) {
        Object cell = row.get(column);
        return cell == null ? "" : cell.toString();
    }

    /** A sentence of the logbook with the names of ingredients in place of their ids. */
    public String spoken(String sentence) {
        return Words.spoken(
                sentence,
                desk.shelfProperty().get().shelf().map(Shelf::ingredients).orElse(List.of()));
    }

    /** Turns to a batch. */
    public void open(Path batch) {
        desk.open(batch);
    }

    /** Ways to see the workbook itself; none where no other program can be asked. */
    public List<Notice.Way> showing(Path logbook) {
        return desk.showing(logbook);
    }
}
