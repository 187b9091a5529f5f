package org.hazewright.files;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import java.util.stream.Stream;
import org.hazewright.learning.Factor;
import org.hazewright.learning.Factors;
import org.hazewright.learning.NewLot;
import org.hazewright.learning.Quantity;
import org.hazewright.mixture.MassSpecific;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Lot;
import org.hazewright.shelf.Source;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** What was learned of a bottle, written beside its ingredient and read again, does the same to light. */
class LotWriterTest {
    private static final String PIGMENT = "carbon-pigment-silicone";

    @TempDir
    private Path folder;

    private Path shelf() throws IOException {
        Path from = Path.of("ingredients");
        try (Stream<Path> all = Files.walk(from)) {
            for (Path p : all.sorted().toList()) {
                Path to = folder.resolve(from.relativize(p).toString());
                if (!Files.isDirectory(p)) Files.copy(p, to);
                else if (Files.notExists(to)) Files.createDirectory(to);
            }
        }
        return folder;
    }

    @Test
    void anAbsorbingPigmentKeepsWhatWasLearnedOfBothItsAbsorptionAndItsScattering() throws IOException {
        Path shelf = shelf();
        Ingredient black = ShelfReader.read(shelf).require(PIGMENT);
        Factors after = new Factors(
                List.of(Factor.of(black, Quantity.ABSORPTION), Factor.of(black, Quantity.SCATTERING)),
                new double[] {1.07, 0.95},
                new double[][] {{0.0004, 0.0001}, {0.0001, 0.0009}});
        Source source = new Source(Source.Basis.MEASURED, "learned in a test");
        Lot lot = new Lot(PIGMENT, "09", Optional.empty(), Optional.empty(), Optional.empty());
        LotWriter.write(shelf, new NewLot(LotWriter.id(PIGMENT, "09"), lot, source).learned(black, after), List.of());
        Ingredient read = ShelfReader.read(shelf).require(LotWriter.id(PIGMENT, "09"));
        for (double nm : new double[] {500, 690, 830}) {
            MassSpecific was = MassSpecific.of(black, nm, 22, 1.41, 0);
            MassSpecific is = MassSpecific.of(read, nm, 22, 1.41, 0);
            assertTrue(was.kappaA() > 0);
            assertEquals(1.07, is.kappaA() / was.kappaA(), 1e-5); // six digits are written
            assertEquals(0.95, is.kappaMusp() / was.kappaMusp(), 1e-5);
        }
        assertEquals(0.02 / 1.07, read.uncertainty().absorption(), 1e-6);
        assertEquals(0.0001 / 0.0006, read.uncertainty().correlation(), 1e-6);
    }

    @Test
    void aLotThatDriftsSaysSoWhenItIsReadAgain() throws IOException {
        Path shelf = shelf();
        Ingredient ink = ShelfReader.read(shelf).require("ink-demo");
        Lot lot = new Lot(
                "ink-demo", "K9", Optional.empty(), Optional.empty(), Optional.of(java.time.LocalDate.of(2026, 2, 1)));
        Factors after = new Factors(
                List.of(Factor.of(ink, Quantity.ABSORPTION), Factor.of(ink, Quantity.SCATTERING)),
                new double[] {1.02, 1},
                new double[][] {{0.0001, 0}, {0, 0.0004}});
        Source source = new Source(Source.Basis.MEASURED, "learned in a test");
        String drift = "absorption of \"it\" drifts: 3 % up.";
        LotWriter.write(
                shelf,
                new NewLot(LotWriter.id("ink-demo", "K9"), lot.drifting(drift), source).learned(ink, after),
                List.of());
        Lot read = ShelfReader.read(shelf).require("ink-demo-lot-K9").lot().orElseThrow();
        assertEquals(Optional.of(drift), read.drift());
        assertEquals(lot.expires(), read.expires());
    }

    @Test
    void aMagnitudeOfAbsorptionWithoutParticlesIsRefusedAtItsLine() throws IOException {
        Path shelf = shelf();
        Path file = shelf.resolve("dye-red-demo.toml");
        Files.writeString(file, Files.readString(file).replace("[absorption]\n", "[absorption]\nmagnitude = 1.1\n"));
        Refusal refusal = assertThrows(Refusal.class, () -> ShelfReader.read(shelf));
        assertTrue(refusal.getMessage().contains("dye-red-demo.toml"), refusal.getMessage());
        assertTrue(refusal.getMessage().contains("[absorption] magnitude"), refusal.getMessage());
    }
}
