package org.hazewright.desk.model;

import java.math.BigDecimal;
import java.math.MathContext;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.Supplier;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Brief;
import org.hazewright.brief.SearchLimits;
import org.hazewright.brief.Target;
import org.hazewright.brief.Tissue;
import org.hazewright.files.BriefReader;
import org.hazewright.mixture.Coefficients;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.hazewright.optics.Refusal;

/** What a recipe is to the papers around it: its brief, its name, its file. */
final class Recipes {
    private Recipes() {}

    /** The recipe as the answer to a brief's file. */
    static Recipe answering(Recipe r, Optional<String> briefSha256) {
        return new Recipe(
                r.title(), r.base(), r.temperatureC(), r.weighingUncertaintyG(), briefSha256, r.stocks(), r.items());
    }

    /** A file of this name and ending that is not there yet; a number is put behind the name when it is taken. */
    static Path freeName(Path folder, String name, String ending) {
        if (Files.notExists(folder.resolve(name + ending))) return folder.resolve(name + ending);
        int n = 2;
        while (Files.exists(folder.resolve(name + "-" + n + ending))) n++;
        return folder.resolve(name + "-" + n + ending);
    }

    /** "bath" of "bath.recipe.toml". */
    static String nameOf(Path file) {
        return file.getFileName().toString().replaceFirst("(\\.recipe|\\.batch|\\.brief)?\\.toml$", "");
    }

    /** The brief in a recipe's folder whose checksum the recipe carries, or that has its name. */
    static Optional<Path> briefBeside(Path recipe, Recipe r, Supplier<Tissue.Spectra> spectra) {
        Path named = recipe.resolveSibling(nameOf(recipe) + ".brief.toml");
        if (r.briefSha256().isEmpty()) return Optional.empty();
        try {
            Brief b = BriefReader.read(named, spectra);
            return b.sha256().equals(r.briefSha256()) ? Optional.of(named) : Optional.empty();
        } catch (Refusal none) {
            return Optional.empty();
        }
    }

    /** A brief that wants what a recipe gives, within 5 %, at 690 and 830 nm or where its figures reach. */
    static Brief asBrief(Recipe r, String name) {
        Mixture mixture = Mixture.of(r);
        List<Target> targets = new ArrayList<>();
        for (double nm : new double[] {690, 830, 633, 785, 550})
            try {
                if (targets.size() == 2) break;
                Coefficients c = mixture.at(nm);
                double a = digits(c.muaPerCm());
                double s = digits(c.muspPerCm());
                if (!(a > 0) && !(s > 0)) continue;
                targets.add(new Target(
                        nm,
                        a > 0 ? OptionalDouble.of(a) : OptionalDouble.empty(),
                        s > 0 ? OptionalDouble.of(s) : OptionalDouble.empty(),
                        0.05 * a,
                        0.05 * s,
                        1));
            } catch (Refusal outOfRange) {
                continue;
            }
        return new Brief(
                name,
                r.title(),
                List.of(r.base().id()),
                digits(mixture.volumeMl()),
                0,
                r.temperatureC(),
                targets,
                List.of(),
                SearchLimits.USUAL,
                Balance.USUAL,
                Optional.empty(),
                Optional.empty());
    }

    private static double digits(double v) {
        return new BigDecimal(v).round(new MathContext(4)).doubleValue();
    }
}
