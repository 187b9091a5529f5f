package org.hazewright.desk.model;

import java.nio.file.Path;
import java.time.LocalDate;
import java.util.List;
import java.util.Optional;
import org.hazewright.batch.Batch;
import org.hazewright.shelf.Shelf;

/**
 * A weighing that begins, or goes on at the step where it was broken off.
 *
 * @param log where its progress is kept
 */
record Started(AtBalance.Prepared prepared, WeighingLog log) {
    static Started again(WeighingLog log, Shelf on) {
        return new Started(AtBalance.Prepared.of(log.batch(on), on, log.entries()), log);
    }

    static Started anew(Shown shown, Path folder, String name, String who, Shelf on) {
        LocalDate today = LocalDate.now();
        Path file = Recipes.freeName(folder, name + "-" + today, ".batch.toml");
        String id = file.getFileName().toString().replace(".batch.toml", "");
        Batch batch = Batch.open(id, shown.recipe(), Optional.of(shown.outlook().brief()), who, today);
        return new Started(AtBalance.Prepared.of(batch, on, List.of()), new WeighingLog(file));
    }
}
