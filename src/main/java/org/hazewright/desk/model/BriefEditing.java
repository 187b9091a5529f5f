package org.hazewright.desk.model;

import java.math.BigDecimal;
import java.math.MathContext;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.UnaryOperator;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Mould;
import org.hazewright.brief.Point;
import org.hazewright.brief.SearchLimits;
import org.hazewright.brief.StockInHand;
import org.hazewright.brief.Target;
import org.hazewright.brief.Tissue;
import org.hazewright.optics.Figures;
import org.hazewright.optics.Refusal;

/**
 * Every edit of a brief that a person can make. Each takes what was typed and gives back what is wrong with it, in words for the field, or
 * nothing; what is wrong changes nothing.
 */
public final class BriefEditing {
    private final Edits<Draft> edits;

    public BriefEditing(Edits<Draft> edits) {
        this.edits = edits;
    }

    private Draft now() {
        return edits.now();
    }

    private Optional<String> attempt(String what, String strand, UnaryOperator<Draft> edit) {
        try {
            edits.edit(edit.apply(now()), what, strand);
            return Optional.empty();
        } catch (Refusal refusal) {
            return Optional.of(refusal.getMessage());
        }
    }

    public Optional<String> title(String text) {
        return attempt("the title", "title", d -> d.withTitle(text));
    }

    public Optional<String> batchMl(String text) {
        return attempt("the batch", "batch", d -> d.withBatchMl(Typed.number(text, "mL", "ml")));
    }

    public Optional<String> overage(String text) {
        return attempt("the extra share", "overage", d -> d.withOverage(Typed.percent(text)));
    }

    public Optional<String> temperatureC(String text) {
        return attempt(
                "the temperature", "temperature", d -> d.withTemperatureC(Typed.number(text, "°C", "C", "deg C")));
    }

    public Optional<String> moulds(List<Mould> moulds) {
        return attempt("the moulds", "", d -> d.withMoulds(moulds));
    }

    /** Ticks a base, or takes its tick away. */
    public Optional<String> toggleBase(String id) {
        return attempt("the base", "", d -> {
            List<String> bases = new ArrayList<>(d.bases());
            if (!bases.remove(id)) bases.add(id);
            return d.withBases(bases);
        });
    }

    public Optional<String> onlyBase(String id) {
        return attempt("the base", "", d -> d.withBases(List.of(id)));
    }

    // the table of targets

    /** An empty text takes the wish away. */
    public Optional<String> wanted(double nm, Point.Quantity q, String text) {
        return row("wanted " + Words.sign(q) + " at " + Figures.plain(nm) + " nm", "wanted " + q + nm, nm, r -> {
            if (text.isBlank() || text.strip().equals("–")) return r.withWanted(q, OptionalDouble.empty());
            double v = Typed.number(text, "/cm", "1/cm", "per cm");
            return r.withWanted(q, OptionalDouble.of(v));
        });
    }

    public Optional<String> allowed(double nm, Point.Quantity q, String text) {
        return row(
                "the tolerance of " + Words.sign(q) + " at " + Figures.plain(nm) + " nm",
                "allowed " + q + nm,
                nm,
                r -> r.withAllowed(q, Allowed.typed(text)));
    }

    public Optional<String> weight(double nm, String text) {
        return row(
                "the weight at " + Figures.plain(nm) + " nm", "weight" + nm, nm, r -> r.withWeight(Typed.number(text)));
    }

    public Optional<String> wavelength(double nm, String text) {
        return row("a wavelength", "", nm, r -> r.withWavelength(Typed.number(text, "nm")));
    }

    private Optional<String> row(String what, String strand, double nm, UnaryOperator<Row> edit) {
        return attempt(what, strand, d -> {
            Row row = d.row(nm)
                    .orElseThrow(() -> new Refusal("There is no row for " + Figures.plain(nm) + " nm any more."));
            return d.withRow(nm, edit.apply(row));
        });
    }

    /** A new row that wants what the recipe gives there now; {@code curves} may be null. */
    public Optional<String> addWavelength(String text, Curves curves) {
        return attempt("a wavelength", "", d -> {
            double nm = Typed.number(text, "nm");
            Row like = d.rows().stream()
                    .min((a, b) -> Double.compare(Math.abs(a.wavelengthNm() - nm), Math.abs(b.wavelengthNm() - nm)))
                    .orElseThrow();
            return d.plusRow(new Row(
                    nm,
                    begins(like.muaPerCm(), curves, Point.Quantity.MUA, nm),
                    begins(like.muspPerCm(), curves, Point.Quantity.MUSP, nm),
                    like.muaAllowed(),
                    like.muspAllowed(),
                    1));
        });
    }

    private static OptionalDouble begins(OptionalDouble like, Curves curves, Point.Quantity q, double nm) {
        if (like.isEmpty()) return like;
        double given = curves == null ? Double.NaN : curves.at(q, nm)[0];
        return OptionalDouble.of(given > 0 ? digits(given, 3) : like.getAsDouble());
    }

    public Optional<String> remove(double nm) {
        return attempt("a wavelength", "", d -> d.withoutRow(nm));
    }

    /** Moves a wanted value while it is dragged; {@link #settle} ends the drag. */
    public void drag(double nm, Point.Quantity q, double perCm) {
        double v = digits(Math.max(0, perCm), 4);
        row(
                "wanted " + Words.sign(q) + " at " + Figures.plain(nm) + " nm",
                "drag " + q + nm,
                nm,
                r -> r.withWanted(q, OptionalDouble.of(v)));
    }

    /** Moves a wanted value by a share of itself, for the arrow keys. */
    public void nudge(double nm, Point.Quantity q, double share) {
        now().row(nm)
                .flatMap(r -> r.wanted(q).isPresent() ? Optional.of(r.wanted(q).getAsDouble()) : Optional.empty())
                .ifPresent(v -> drag(nm, q, v * (1 + share)));
    }

    public void settle() {
        edits.settle();
    }

    private static double digits(double v, int digits) {
        return new BigDecimal(v).round(new MathContext(digits)).doubleValue();
    }

    /** Takes the targets of a table in place of those that are there. */
    public Optional<String> targets(List<Target> targets, String from) {
        return attempt(
                "targets from " + from,
                "",
                d -> d.withRows(targets.stream().map(Row::of).toList()).withTissue(Optional.empty()));
    }

    // tissue-like values

    /** Fills rows at the composition's wavelengths; rows at other wavelengths that the last composition did not make stay. */
    public Optional<String> tissue(Tissue tissue, Tissue.Spectra spectra) {
        return attempt("tissue-like values", "tissue", d -> {
            List<Row> rows = new ArrayList<>(d.rows());
            d.tissue().ifPresent(last -> {
                for (double nm : last.wavelengthsNm()) rows.removeIf(r -> r.wavelengthNm() == nm);
            });
            double mua = commonShare(d, Point.Quantity.MUA);
            double musp = commonShare(d, Point.Quantity.MUSP);
            for (Target t : tissue.targets(spectra, mua, musp)) {
                rows.removeIf(r -> r.wavelengthNm() == t.wavelengthNm());
                if (!(t.muaPerCm().getAsDouble() > 0))
                    throw new Refusal("This composition absorbs nothing at " + Figures.plain(t.wavelengthNm())
                            + " nm; give it haemoglobin, water or fat.");
                rows.add(Row.of(t));
            }
            return d.withRows(rows).withTissue(Optional.of(tissue));
        });
    }

    private static double commonShare(Draft d, Point.Quantity q) {
        return d.rows().stream()
                .map(r -> r.allowed(q))
                .filter(Allowed.Share.class::isInstance)
                .mapToDouble(a -> ((Allowed.Share) a).share())
                .findFirst()
                .orElse(0.05);
    }

    // the shelf

    /** Lets the search take an ingredient, or keeps it out. */
    public Optional<String> allowIngredient(String id, boolean allow) {
        return attempt(allow ? "letting " + id + " in" : "leaving " + id + " out", "", d -> {
            SearchLimits l = d.limits();
            List<String> use = new ArrayList<>(l.use());
            List<String> avoid = new ArrayList<>(l.avoid());
            avoid.remove(id);
            if (use.isEmpty()) {
                if (!allow) avoid.add(id);
            } else if (allow) {
                if (!use.contains(id)) use.add(id);
            } else {
                use.remove(id);
                if (use.isEmpty()) throw new Refusal("Something must stay ticked; tick another one first.");
            }
            return d.withLimits(limits(l, use, avoid));
        });
    }

    public Optional<String> allowAll() {
        return attempt("the whole shelf", "", d -> d.withLimits(limits(d.limits(), List.of(), List.of())));
    }

    public Optional<String> allowOnly(List<String> ids) {
        return attempt("only what is in use", "", d -> d.withLimits(limits(d.limits(), ids, List.of())));
    }

    private static SearchLimits limits(SearchLimits l, List<String> use, List<String> avoid) {
        return new SearchLimits(use, avoid, l.maxAbsorbers(), l.maxScatterers(), l.maxModifiers(), l.leastBaseShare());
    }

    public Optional<String> maxAbsorbers(String text) {
        return attempt("the most absorbers", "max absorbers", d -> {
            SearchLimits l = d.limits();
            return d.withLimits(new SearchLimits(
                    l.use(),
                    l.avoid(),
                    Typed.whole(text, 0, 8),
                    l.maxScatterers(),
                    l.maxModifiers(),
                    l.leastBaseShare()));
        });
    }

    public Optional<String> maxScatterers(String text) {
        return attempt("the most scatterers", "max scatterers", d -> {
            SearchLimits l = d.limits();
            return d.withLimits(new SearchLimits(
                    l.use(),
                    l.avoid(),
                    l.maxAbsorbers(),
                    Typed.whole(text, 0, 8),
                    l.maxModifiers(),
                    l.leastBaseShare()));
        });
    }

    public Optional<String> maxModifiers(String text) {
        return attempt("the most modifiers", "max modifiers", d -> {
            SearchLimits l = d.limits();
            return d.withLimits(new SearchLimits(
                    l.use(),
                    l.avoid(),
                    l.maxAbsorbers(),
                    l.maxScatterers(),
                    Typed.whole(text, 0, 8),
                    l.leastBaseShare()));
        });
    }

    // the balance, in g

    public Optional<String> readability(String text) {
        return balance(
                "readability",
                b -> new Balance(grams(text), b.standardUncertaintyG(), b.smallestLoadG(), b.capacityG()));
    }

    public Optional<String> balanceUncertainty(String text) {
        return balance(
                "uncertainty", b -> new Balance(b.readabilityG(), grams(text), b.smallestLoadG(), b.capacityG()));
    }

    public Optional<String> smallestLoad(String text) {
        return balance(
                "smallest load",
                b -> new Balance(b.readabilityG(), b.standardUncertaintyG(), grams(text), b.capacityG()));
    }

    public Optional<String> capacity(String text) {
        return balance(
                "capacity",
                b -> new Balance(b.readabilityG(), b.standardUncertaintyG(), b.smallestLoadG(), grams(text)));
    }

    private Optional<String> balance(String what, UnaryOperator<Balance> edit) {
        return attempt("the balance's " + what, "balance " + what, d -> d.withBalance(edit.apply(d.balance())));
    }

    private static double grams(String text) {
        return text.strip().endsWith("mg") ? Typed.number(text, "mg") / 1000 : Typed.number(text, "g");
    }

    // stocks in hand

    /** Takes a stock in hand away. */
    public Optional<String> removeStock(String id) {
        return attempt(
                "the stock " + id,
                "",
                d -> d.withStocks(
                        d.stocks().stream().filter(s -> !s.id().equals(id)).toList()));
    }

    /** Puts a stock in hand, all as typed: {@code of} is an ingredient's id or an earlier stock's, {@code diluent} an ingredient's. */
    public Optional<String> addStock(String id, String of, String ofG, String diluent, String diluentG) {
        return attempt("the stock " + id, "", d -> {
            String name = id.strip();
            if (!name.matches("[a-z0-9][a-z0-9-]*"))
                throw new Refusal("Name the stock with small letters, digits and hyphens, such as ink-1-100.");
            boolean diluted = d.stocks().stream().anyMatch(s -> s.id().equals(of));
            StockInHand stock = new StockInHand(
                    name,
                    diluted ? Optional.empty() : Optional.of(of),
                    diluted ? Optional.of(of) : Optional.empty(),
                    grams(ofG),
                    diluent,
                    grams(diluentG));
            List<StockInHand> more = new ArrayList<>(d.stocks());
            more.add(stock);
            return d.withStocks(more);
        });
    }

    // other ways

    /** Keeps to a way that was offered, or with nothing goes back to the best. */
    public void choose(Optional<List<String>> key) {
        attempt("the choice of a recipe", "", d -> d.withChosen(key));
    }
}
