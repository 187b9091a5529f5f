package org.hazewright.files;

import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.function.Supplier;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Brief;
import org.hazewright.brief.Mould;
import org.hazewright.brief.SearchLimits;
import org.hazewright.brief.StockInHand;
import org.hazewright.brief.Target;
import org.hazewright.brief.Tissue;

/**
 * A brief file to a {@link Brief}. What it leaves out is: tolerances 5 %, no extra share, 22 °C, the limits of {@link
 * SearchLimits#USUAL}, and a usual laboratory balance.
 */
public final class BriefReader {
    static final List<String> SHARED_KEYS = List.of(
            "format",
            "title",
            "base",
            "batch_ml",
            "mould",
            "overage",
            "temperature_c",
            "tolerance",
            "shelf",
            "balance");

    private BriefReader() {}

    /** {@code spectra} is asked only when the brief has a {@code [tissue]}. */
    public static Brief read(Path file, Supplier<Tissue.Spectra> spectra) {
        TextFile text = TextFile.read(file);
        TomlPage page = TomlPage.of(text);
        page.requireFormat(FileKind.BRIEF);
        for (String key : new String[] {"series", "phantom", "titration"})
            if (page.has(key))
                throw page.refusal(
                        key, "This brief describes a set of phantoms (" + key + "); use the command series for it.");
        List<String> known = new ArrayList<>(SHARED_KEYS);
        known.addAll(List.of("target", "tissue", "stock_in_hand"));
        page.refuseUnknown(known);
        Tolerance tolerance = Tolerance.read(page);
        Optional<Tissue> tissue = page.table("tissue").map(TargetReader::tissue);
        List<Target> targets = TargetReader.read(page, tissue, spectra, tolerance);
        if (targets.isEmpty())
            throw page.at()
                    .refusal(
                            "The brief has no targets; add a [[target]] with wavelength_nm and mua_per_cm or musp_per_cm, or"
                                    + " a [tissue].");
        String name = nameOf(file);
        return shared(page, name, page.text("title", name), text.sha256(), targets, tissue);
    }

    /** A brief that comes with the program, by its name. */
    public static Brief readShipped(String name) {
        return ShelfReader.inShipped(
                shelf -> read(shelf.resolveSibling("demo").resolve(name + ".brief.toml"), TissueSpectra::shipped));
    }

    /** A brief of the parts that all kinds of brief files share, with these targets. */
    static Brief shared(
            TomlPage page, String name, String title, String sha256, List<Target> targets, Optional<Tissue> tissue) {
        List<String> bases = page.textOrTexts("base");
        List<Mould> moulds = moulds(page);
        double batchMl = batchMl(page, moulds);
        double overage = page.within("overage", 0, 2, 0);
        double temperatureC = page.within("temperature_c", 0, 100, 22);
        SearchLimits limits = limits(page.table("shelf"));
        List<StockInHand> stocks = stocks(page);
        Balance balance = page.table("balance").map(BriefReader::balance).orElse(Balance.USUAL);
        return page.at()
                .of(() -> new Brief(
                        name,
                        title,
                        bases,
                        batchMl,
                        overage,
                        temperatureC,
                        targets,
                        moulds,
                        limits,
                        balance,
                        stocks,
                        tissue,
                        Optional.of(sha256)));
    }

    /** {@code forearm.brief.toml} is called forearm, and so is {@code forearm.toml}. */
    public static String nameOf(Path file) {
        String name = file.getFileName().toString();
        for (String ending : new String[] {".brief.toml", ".toml"})
            if (name.toLowerCase(Locale.ROOT).endsWith(ending) && name.length() > ending.length())
                return name.substring(0, name.length() - ending.length());
        return name;
    }

    private static double batchMl(TomlPage page, List<Mould> moulds) {
        if (!page.has("batch_ml") && moulds.isEmpty())
            throw page.at().refusal("The brief does not say how much to make; give batch_ml, or [[mould]] entries.");
        if (page.has("batch_ml") && !moulds.isEmpty())
            throw page.refusal(
                    "batch_ml",
                    "The brief gives batch_ml and [[mould]] entries; keep one, the moulds say their volume"
                            + " themselves.");
        return moulds.isEmpty()
                ? page.positive("batch_ml")
                : moulds.stream().mapToDouble(Mould::volumeMl).sum();
    }

    static List<Mould> moulds(TomlPage page) {
        List<Mould> moulds = new ArrayList<>();
        for (TomlPage table : page.tables("mould")) {
            if (table.oneOf("shape", "box", "cylinder").equals("box")) {
                table.refuseUnknown("shape", "length_mm", "width_mm", "height_mm", "count");
                double length = table.positive("length_mm");
                double width = table.positive("width_mm");
                double height = table.positive("height_mm");
                int count = table.whole("count", 1, 1000, 1);
                moulds.add(table.at().of(() -> new Mould(Mould.Shape.BOX, length, width, height, count)));
            } else {
                table.refuseUnknown("shape", "diameter_mm", "height_mm", "count");
                double diameter = table.positive("diameter_mm");
                double height = table.positive("height_mm");
                int count = table.whole("count", 1, 1000, 1);
                moulds.add(table.at().of(() -> Mould.cylinder(diameter, height, count)));
            }
        }
        return moulds;
    }

    private static List<StockInHand> stocks(TomlPage page) {
        List<StockInHand> stocks = new ArrayList<>();
        for (TomlPage t : page.tables("stock_in_hand")) {
            t.refuseUnknown("id", "ingredient", "stock", "ingredient_g", "diluent", "diluent_g");
            String id = Ids.require(t, "id");
            if (stocks.stream().anyMatch(s -> s.id().equals(id)))
                throw t.refusal("id", "Two stocks are called \"" + id + "\"; give each its own id.");
            Optional<String> from = t.maybeText("stock");
            if (from.isPresent() && stocks.stream().noneMatch(s -> s.id().equals(from.get())))
                throw t.refusal(
                        "stock",
                        "No earlier [[stock_in_hand]] is called \"" + from.get() + "\"; write it above this one.");
            Optional<String> ingredient = t.maybeText("ingredient");
            double ingredientG = t.positive("ingredient_g");
            String diluent = t.text("diluent");
            double diluentG = t.positive("diluent_g");
            stocks.add(t.at().of(() -> new StockInHand(id, ingredient, from, ingredientG, diluent, diluentG)));
        }
        return stocks;
    }

    private static SearchLimits limits(Optional<TomlPage> shelf) {
        if (shelf.isEmpty()) return SearchLimits.USUAL;
        TomlPage t = shelf.get();
        t.refuseUnknown("use", "avoid", "max_absorbers", "max_scatterers", "max_modifiers", "least_base_share");
        List<String> use = t.texts("use");
        List<String> avoid = t.texts("avoid");
        for (int i = 0; i < avoid.size(); i++)
            if (use.contains(avoid.get(i)))
                throw t.at("avoid", i)
                        .refusal("\"" + avoid.get(i) + "\" stands in use and in avoid; take it out of one.");
        return new SearchLimits(
                use,
                avoid,
                t.whole("max_absorbers", 0, 8, SearchLimits.USUAL.maxAbsorbers()),
                t.whole("max_scatterers", 0, 8, SearchLimits.USUAL.maxScatterers()),
                t.whole("max_modifiers", 0, 8, SearchLimits.USUAL.maxModifiers()),
                t.within("least_base_share", 0, 1, 0));
    }

    static Balance balance(TomlPage t) {
        t.refuseUnknown("readability_g", "standard_uncertainty_g", "smallest_load_g", "capacity_g");
        Balance usual = Balance.USUAL;
        double readability = t.positive("readability_g", usual.readabilityG());
        double uncertainty = t.has("standard_uncertainty_g")
                ? t.notNegative("standard_uncertainty_g")
                : t.has("readability_g") ? readability : usual.standardUncertaintyG();
        double smallest = t.has("smallest_load_g") ? t.notNegative("smallest_load_g") : usual.smallestLoadG();
        double capacity = t.positive("capacity_g", usual.capacityG());
        return t.at().of(() -> new Balance(readability, uncertainty, smallest, capacity));
    }
}
