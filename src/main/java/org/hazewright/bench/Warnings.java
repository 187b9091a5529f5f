package org.hazewright.bench;

import java.time.LocalDate;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Set;
import java.util.function.Predicate;
import java.util.stream.Collectors;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;
import org.hazewright.shelf.Conflict;
import org.hazewright.shelf.Form;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Lot;

/**
 * What a person should know before starting: ingredients that should not meet, lots past their date or drifting, what settles, and what can
 * hurt, the gravest first.
 *
 * <p>A conflict is looked up from both sides. What it names is an ingredient's id, the ingredient that a lot is of, or a plain word
 * ("blood") that stands in the other's id or name.
 */
public final class Warnings {
    private final Recipe recipe;
    private final List<Ingredient> present;
    private final List<Warning> warnings = new ArrayList<>();

    private Warnings(Recipe recipe) {
        this.recipe = recipe;
        Set<Ingredient> all = new LinkedHashSet<>();
        recipe.items().forEach(i -> all.add(i.ingredient()));
        recipe.stocks().stream().map(Stock::diluent).forEach(all::add);
        all.add(recipe.base());
        present = List.copyOf(all);
    }

    /** {@code day} is the day of making, for the dates of lots. */
    public static List<Warning> of(Recipe recipe, LocalDate day) {
        Warnings w = new Warnings(recipe);
        w.conflicts();
        w.lots(day);
        w.temperature();
        w.settling();
        w.hazards();
        return w.warnings.stream()
                .sorted(java.util.Comparator.comparing(Warning::kind))
                .toList();
    }

    private void conflicts() {
        Map<Set<Ingredient>, Set<String>> why = new LinkedHashMap<>();
        Set<Set<Ingredient>> forbidden = new LinkedHashSet<>();
        for (Ingredient one : present)
            for (Conflict c : one.conflicts())
                for (Ingredient other : present) {
                    if (one.equals(other) || ownPart(one, other) || !names(c.with(), other)) continue;
                    Set<Ingredient> pair = Set.of(one, other);
                    why.computeIfAbsent(pair, p -> new LinkedHashSet<>()).add(c.why());
                    if (c.refuse()) forbidden.add(pair);
                }
        why.forEach((pair, reasons) -> {
            List<Ingredient> two = present.stream().filter(pair::contains).toList();
            boolean never = forbidden.contains(pair);
            warnings.add(new Warning(
                    never ? Warning.Kind.FORBIDDEN : Warning.Kind.CONFLICT,
                    ids(two),
                    two.get(0).name() + " and " + two.get(1).name()
                            + (never ? " must not be put together: " : " do not go well together: ")
                            + String.join("; ", reasons) + "."));
        });
    }

    private boolean ownPart(Ingredient one, Ingredient other) {
        Ingredient base = recipe.base();
        return one.equals(base) && isPartOf(base, other) || other.equals(base) && isPartOf(base, one);
    }

    private static boolean isPartOf(Ingredient base, Ingredient i) {
        return base.blend().stream().anyMatch(p -> p.ingredient().equals(i.id()));
    }

    static boolean names(String with, Ingredient other) {
        if (with.equals(other.id()) || with.equals(other.kind())) return true;
        return hasWord(other.id(), with) || hasWord(other.name(), with);
    }

    private static boolean hasWord(String text, String word) {
        return Arrays.asList(text.toLowerCase(Locale.ROOT).split("[^\\p{L}\\p{N}]+"))
                .contains(word.toLowerCase(Locale.ROOT));
    }

    private void lots(LocalDate day) {
        for (Ingredient i : present) {
            if (i.lot().isEmpty()) continue;
            Lot lot = i.lot().get();
            LotDoubt.expired(i, lot, day)
                    .ifPresent(s -> warnings.add(new Warning(Warning.Kind.EXPIRED, List.of(i.id()), s)));
            LotDoubt.drifting(i, lot)
                    .ifPresent(s -> warnings.add(new Warning(Warning.Kind.DRIFTING, List.of(i.id()), s)));
        }
    }

    private void temperature() {
        if (WeighingOrder.castAndCured(recipe.base())) return;
        MakingFacts facts = new MakingFacts(recipe);
        if (facts.meltC().isEmpty() || facts.stayAboveC().isEmpty()) return;
        double least = facts.stayAboveC().getAsDouble();
        for (Ingredient i : facts.added())
            i.making().addBelowC().ifPresent(limit -> {
                if (limit < least)
                    warnings.add(
                            new Warning(
                                    Warning.Kind.TEMPERATURE,
                                    List.of(i.id(), recipe.base().id()),
                                    i.name() + " should go in below " + Grams.plain(limit) + " °C, but "
                                            + recipe.base().name()
                                            + " thickens below " + Grams.plain(least)
                                            + " °C. Add it as cool as the gel allows, quickly, and check the phantom for streaks."));
            });
    }

    private void settling() {
        List<Ingredient> settling = present.stream().filter(Ingredient::settles).toList();
        for (Ingredient i : settling)
            warnings.add(new Warning(
                    Warning.Kind.SETTLING,
                    List.of(i.id()),
                    i.name() + " settles: "
                            + switch (recipe.base().family()) {
                                case LIQUID -> "stir without pause, and again before every measurement.";
                                case GEL -> "stir until the gel is about to set, then cool it quickly.";
                                case SILICONE, RESIN -> "stir until pouring and turn the mould while it thickens.";
                            }));
    }

    private void hazards() {
        hazard("Dust", i -> i.form() == Form.POWDER, Cautions.POWDER);
        hazard("Azide", i -> hasWord(i.id(), "azide") || hasWord(i.name(), "azide"), Cautions.AZIDE);
        hazard("Blood", Warnings::ofBlood, Cautions.BLOOD);
        hazard("Isocyanate", Warnings::holdsIsocyanate, Cautions.ISOCYANATE);
        if (WeighingOrder.castAndCured(recipe.base()))
            hazard("Uncured parts", i -> i.equals(recipe.base()) || isPartOf(recipe.base(), i), Cautions.HARDENER);
        if (new MakingFacts(recipe).meltC().isPresent()) hazard("Heating", recipe.base()::equals, Cautions.HOT);
    }

    static boolean ofBlood(Ingredient i) {
        return List.of("blood", "haemoglobin", "hemoglobin", "erythrocytes").stream()
                .anyMatch(w -> hasWord(i.id(), w) || hasWord(i.name(), w));
    }

    static boolean holdsIsocyanate(Ingredient i) {
        return i.id().toLowerCase(Locale.ROOT).contains("isocyanate")
                || i.name().toLowerCase(Locale.ROOT).contains("isocyanate")
                || i.cautions().stream()
                        .anyMatch(c -> c.toLowerCase(Locale.ROOT).contains("isocyanate"));
    }

    private void hazard(String what, Predicate<Ingredient> whom, String text) {
        List<Ingredient> found = present.stream().filter(whom).toList();
        // The base's name stands for its parts where both are meant.
        List<Ingredient> named = found.contains(recipe.base())
                ? found.stream().filter(i -> !isPartOf(recipe.base(), i)).toList()
                : found;
        if (!named.isEmpty())
            warnings.add(new Warning(
                    Warning.Kind.HAZARD,
                    ids(named),
                    what + " (" + named.stream().map(Ingredient::name).collect(Collectors.joining("; ")) + "): "
                            + text));
    }

    private static List<String> ids(List<Ingredient> ingredients) {
        return ingredients.stream().map(Ingredient::id).toList();
    }
}
