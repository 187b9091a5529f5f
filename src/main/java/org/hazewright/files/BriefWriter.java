package org.hazewright.files;

import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.Supplier;
import java.util.function.ToDoubleFunction;
import java.util.stream.Collectors;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Brief;
import org.hazewright.brief.Mould;
import org.hazewright.brief.SearchLimits;
import org.hazewright.brief.StockInHand;
import org.hazewright.brief.Target;
import org.hazewright.brief.Tissue;

/**
 * A brief as a file that {@link BriefReader} reads back equal.
 *
 * <p>A target that a brief's composition gives is left to its {@code [tissue]}; a tolerance is written as a share of the value where it was
 * one, else as a half-width.
 */
public final class BriefWriter {
    private final StringBuilder out = new StringBuilder();
    private final Brief brief;
    private final double muaShare;
    private final double muspShare;

    private BriefWriter(Brief brief) {
        this.brief = brief;
        this.muaShare = usual(t -> share(t.muaTolerancePerCm(), t.muaPerCm()));
        this.muspShare = usual(t -> share(t.muspTolerancePerCm(), t.muspPerCm()));
    }

    /** {@code notes} stand as comments at the top, one line each; {@code spectra} are asked for a brief with a tissue only. */
    public static void write(
            Path file, Brief brief, List<String> notes, Supplier<Tissue.Spectra> spectra, SafeFile.Overwrite policy) {
        SafeFile.write(file, text(brief, notes, spectra), policy);
    }

    public static String text(Brief brief, List<String> notes, Supplier<Tissue.Spectra> spectra) {
        BriefWriter writer = new BriefWriter(brief);
        notes.forEach(note -> writer.line(TomlText.comment(note)));
        writer.whole(spectra);
        return writer.out.toString();
    }

    private void whole(Supplier<Tissue.Spectra> spectra) {
        line("format = 1");
        line("title = " + TomlText.text(brief.title()));
        line("base = "
                + (brief.bases().size() == 1 ? TomlText.text(brief.bases().get(0)) : texts(brief.bases())));
        if (brief.moulds().isEmpty()) number("batch_ml", brief.batchMl());
        if (brief.overage() > 0) number("overage", brief.overage());
        number("temperature_c", brief.temperatureC());
        brief.moulds().forEach(this::mould);
        line("");
        line("[tolerance]");
        number("mua", muaShare);
        number("musp", muspShare);
        Map<Double, Target> given = tissue(spectra);
        for (Target t : brief.targets()) target(t, Optional.ofNullable(given.get(t.wavelengthNm())));
        limits(brief.limits());
        balance(brief.balance());
        brief.stocksInHand().forEach(this::stock);
    }

    private void stock(StockInHand s) {
        line("");
        line("[[stock_in_hand]]");
        line("id = " + TomlText.text(s.id()));
        s.ingredient().ifPresent(id -> line("ingredient = " + TomlText.text(id)));
        s.from().ifPresent(id -> line("stock = " + TomlText.text(id)));
        number("ingredient_g", s.ingredientG());
        line("diluent = " + TomlText.text(s.diluent()));
        number("diluent_g", s.diluentG());
    }

    private void mould(Mould m) {
        line("");
        line("[[mould]]");
        boolean box = m.shape() == Mould.Shape.BOX;
        line("shape = " + TomlText.text(box ? "box" : "cylinder"));
        if (box) {
            number("length_mm", m.lengthMm());
            number("width_mm", m.widthMm());
        } else number("diameter_mm", m.lengthMm());
        number("height_mm", m.heightMm());
        line("count = " + m.count());
    }

    /** Writes the composition for the wavelengths that it can stand for; the targets that it gives, by wavelength. */
    private Map<Double, Target> tissue(Supplier<Tissue.Spectra> spectra) {
        Map<Double, Target> given = new HashMap<>();
        if (brief.tissue().isEmpty()) return given;
        Tissue t = brief.tissue().get();
        for (Target made : t.targets(spectra.get(), muaShare, muspShare))
            brief.targets().stream()
                    .filter(own -> own.wavelengthNm() == made.wavelengthNm())
                    .filter(own -> own.muaPerCm().isPresent()
                            && (made.muspPerCm().isEmpty() || own.muspPerCm().isPresent()))
                    .forEach(own -> given.put(made.wavelengthNm(), made));
        if (given.isEmpty()) return given;
        line("");
        line("[tissue]");
        line("wavelengths_nm = "
                + given.keySet().stream().sorted().map(TomlText::number).collect(Collectors.joining(", ", "[", "]")));
        number("haemoglobin_umol_per_l", t.haemoglobinUmolPerL());
        number("saturation", t.saturation());
        number("water_fraction", t.waterFraction());
        number("fat_fraction", t.fatFraction());
        t.muspPerCmAt500Nm().ifPresent(v -> {
            number("musp_per_cm_at_500nm", v);
            number("scatter_power", t.scatterPower());
        });
        return given;
    }

    private void target(Target t, Optional<Target> given) {
        boolean mua = t.muaPerCm().isPresent()
                && given.filter(g ->
                                same(g.muaPerCm(), t.muaPerCm()) && near(g.muaTolerancePerCm(), t.muaTolerancePerCm()))
                        .isEmpty();
        boolean musp = t.muspPerCm().isPresent()
                && given.filter(g -> same(g.muspPerCm(), t.muspPerCm())
                                && near(g.muspTolerancePerCm(), t.muspTolerancePerCm()))
                        .isEmpty();
        boolean weighted = t.weight() != 1;
        if (!mua && !musp && !weighted) return;
        if (weighted && !musp) mua |= t.muaPerCm().isPresent();
        if (weighted && !mua) musp |= t.muspPerCm().isPresent();
        line("");
        line("[[target]]");
        number("wavelength_nm", t.wavelengthNm());
        if (mua) value("mua", t.muaPerCm().getAsDouble(), t.muaTolerancePerCm(), muaShare);
        if (musp) value("musp", t.muspPerCm().getAsDouble(), t.muspTolerancePerCm(), muspShare);
        if (weighted) number("weight", t.weight());
    }

    private void value(String name, double wanted, double halfWidth, double usual) {
        number(name + "_per_cm", wanted);
        OptionalDouble share = Target.shareOf(halfWidth, wanted);
        if (share.isEmpty()) number(name + "_tolerance_per_cm", halfWidth);
        else if (share.getAsDouble() != usual) number(name + "_tolerance", share.getAsDouble());
    }

    private void limits(SearchLimits l) {
        line("");
        line("[shelf]");
        if (!l.use().isEmpty()) line("use = " + texts(l.use()));
        if (!l.avoid().isEmpty()) line("avoid = " + texts(l.avoid()));
        line("max_absorbers = " + l.maxAbsorbers());
        line("max_scatterers = " + l.maxScatterers());
        line("max_modifiers = " + l.maxModifiers());
        if (l.leastBaseShare() > 0) number("least_base_share", l.leastBaseShare());
    }

    private void balance(Balance b) {
        line("");
        line("[balance]");
        number("readability_g", b.readabilityG());
        number("standard_uncertainty_g", b.standardUncertaintyG());
        number("smallest_load_g", b.smallestLoadG());
        number("capacity_g", b.capacityG());
    }

    /** The share that most targets have; 5 % when none has one. */
    private double usual(ToDoubleFunction<Target> share) {
        return brief.targets().stream()
                .mapToDouble(share)
                .filter(s -> s > 0)
                .boxed()
                .collect(Collectors.groupingBy(s -> s, Collectors.counting()))
                .entrySet()
                .stream()
                .max(Map.Entry.<Double, Long>comparingByValue()
                        .thenComparing(Map.Entry.comparingByKey(Comparator.reverseOrder())))
                .map(Map.Entry::getKey)
                .orElse(0.05);
    }

    private static double share(double halfWidth, OptionalDouble wanted) {
        return wanted.isPresent()
                ? Target.shareOf(halfWidth, wanted.getAsDouble()).orElse(0)
                : 0;
    }

    private static boolean same(OptionalDouble one, OptionalDouble other) {
        return one.isPresent() && other.isPresent() && one.getAsDouble() == other.getAsDouble();
    }

    private static boolean near(double one, double other) {
        return Math.abs(one - other) <= 1e-12 * Math.abs(one);
    }

    private static String texts(List<String> values) {
        List<String> quoted = new ArrayList<>();
        values.forEach(v -> quoted.add(TomlText.text(v)));
        return quoted.stream().collect(Collectors.joining(", ", "[", "]"));
    }

    private void number(String key, double v) {
        line(key + " = " + TomlText.number(v));
    }

    private void line(String text) {
        out.append(text).append('\n');
    }
}
