package org.hazewright.desk.model;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Brief;
import org.hazewright.brief.Mould;
import org.hazewright.brief.SearchLimits;
import org.hazewright.brief.StockInHand;
import org.hazewright.brief.Tissue;
import org.hazewright.optics.Figures;
import org.hazewright.optics.Refusal;

/**
 * A brief while it is being written: what a {@link Brief} holds, with tolerances as the person said them. Always a valid brief: an edit that
 * would not be is refused in words, and the draft stays.
 *
 * @param rows by wavelength, each wavelength once
 * @param tissue the composition that rows were filled from, for editing it again
 * @param stocks dilutions that stand made already, in making order
 * @param chosen the labels of the recipe that a person chose over the best one; empty for the best
 */
public record Draft(
        String name,
        String title,
        List<String> bases,
        double batchMl,
        List<Mould> moulds,
        double overage,
        double temperatureC,
        List<Row> rows,
        Optional<Tissue> tissue,
        SearchLimits limits,
        Balance balance,
        List<StockInHand> stocks,
        Optional<List<String>> chosen) {

    public Draft {
        bases = List.copyOf(bases);
        moulds = List.copyOf(moulds);
        stocks = List.copyOf(stocks);
        rows = rows.stream()
                .sorted(Comparator.comparingDouble(Row::wavelengthNm))
                .toList();
        for (int k = 1; k < rows.size(); k++)
            if (rows.get(k).wavelengthNm() == rows.get(k - 1).wavelengthNm())
                throw new Refusal(
                        "There is a row for " + Figures.plain(rows.get(k).wavelengthNm()) + " nm already.");
        if (rows.isEmpty()) throw new Refusal("A brief keeps at least one wavelength.");
        if (title.isBlank()) throw new Refusal("Give the brief a title.");
        if (bases.isEmpty()) throw new Refusal("Tick at least one base.");
        if (!(batchMl > 0 && batchMl <= 1e6)) throw new Refusal("A batch is above 0 and at most 1000000 mL.");
        if (!(overage >= 0 && overage <= 2)) throw new Refusal("The extra share lies between 0 and 200 %.");
        if (!(temperatureC >= 0 && temperatureC <= 100))
            throw new Refusal("The temperature lies between 0 and 100 °C.");
        rows.forEach(Row::target);
        for (int k = 0; k < stocks.size(); k++) {
            StockInHand stock = stocks.get(k);
            List<String> earlier =
                    stocks.subList(0, k).stream().map(StockInHand::id).toList();
            if (earlier.contains(stock.id()))
                throw new Refusal("Two stocks are called “" + stock.id() + "”; give each its own name.");
            stock.from().filter(from -> !earlier.contains(from)).ifPresent(from -> {
                throw new Refusal("The stock “" + stock.id() + "” was diluted from “" + from + "”, which is not here.");
            });
        }
    }

    public static Draft of(Brief b) {
        return new Draft(
                b.name(),
                b.title(),
                b.bases(),
                b.batchMl(),
                b.moulds(),
                b.overage(),
                b.temperatureC(),
                b.targets().stream().map(Row::of).toList(),
                b.tissue(),
                b.limits(),
                b.balance(),
                b.stocksInHand(),
                Optional.empty());
    }

    /** {@code sha256} of the file that holds exactly this draft, when there is one. */
    public Brief brief(Optional<String> sha256) {
        return new Brief(
                name,
                title,
                bases,
                batchMl,
                overage,
                temperatureC,
                rows.stream().map(Row::target).toList(),
                moulds,
                limits,
                balance,
                stocks,
                tissue,
                sha256);
    }

    public Optional<Row> row(double nm) {
        return rows.stream().filter(r -> r.wavelengthNm() == nm).findFirst();
    }

    /** The draft with the row at a wavelength in another form; a row of another wavelength moves. */
    public Draft withRow(double nm, Row changed) {
        List<Row> others = new ArrayList<>(rows);
        others.replaceAll(r -> r.wavelengthNm() == nm ? changed : r);
        return withRows(others);
    }

    public Draft withoutRow(double nm) {
        return withRows(rows.stream().filter(r -> r.wavelengthNm() != nm).toList());
    }

    public Draft plusRow(Row row) {
        List<Row> more = new ArrayList<>(rows);
        more.add(row);
        return withRows(more);
    }

    public Draft withRows(List<Row> r) {
        return new Draft(
                name, title, bases, batchMl, moulds, overage, temperatureC, r, tissue, limits, balance, stocks, chosen);
    }

    public Draft withName(String n) {
        return new Draft(
                n, title, bases, batchMl, moulds, overage, temperatureC, rows, tissue, limits, balance, stocks, chosen);
    }

    public Draft withTitle(String t) {
        return new Draft(
                name,
                t.strip(),
                bases,
                batchMl,
                moulds,
                overage,
                temperatureC,
                rows,
                tissue,
                limits,
                balance,
                stocks,
                chosen);
    }

    /** Choosing another base gives up a recipe that was chosen. */
    public Draft withBases(List<String> b) {
        return new Draft(
                name,
                title,
                b,
                batchMl,
                moulds,
                overage,
                temperatureC,
                rows,
                tissue,
                limits,
                balance,
                stocks,
                Optional.empty());
    }

    /** A batch said in mL takes the place of moulds. */
    public Draft withBatchMl(double ml) {
        return new Draft(
                name,
                title,
                bases,
                ml,
                List.of(),
                overage,
                temperatureC,
                rows,
                tissue,
                limits,
                balance,
                stocks,
                chosen);
    }

    public Draft withMoulds(List<Mould> m) {
        double ml = m.stream().mapToDouble(Mould::volumeMl).sum();
        return new Draft(
                name,
                title,
                bases,
                m.isEmpty() ? batchMl : ml,
                m,
                overage,
                temperatureC,
                rows,
                tissue,
                limits,
                balance,
                stocks,
                chosen);
    }

    public Draft withOverage(double o) {
        return new Draft(
                name, title, bases, batchMl, moulds, o, temperatureC, rows, tissue, limits, balance, stocks, chosen);
    }

    public Draft withTemperatureC(double t) {
        return new Draft(
                name, title, bases, batchMl, moulds, overage, t, rows, tissue, limits, balance, stocks, chosen);
    }

    public Draft withTissue(Optional<Tissue> t) {
        return new Draft(
                name, title, bases, batchMl, moulds, overage, temperatureC, rows, t, limits, balance, stocks, chosen);
    }

    public Draft withLimits(SearchLimits l) {
        return new Draft(
                name,
                title,
                bases,
                batchMl,
                moulds,
                overage,
                temperatureC,
                rows,
                tissue,
                l,
                balance,
                stocks,
                Optional.empty());
    }

    public Draft withBalance(Balance b) {
        return new Draft(
                name, title, bases, batchMl, moulds, overage, temperatureC, rows, tissue, limits, b, stocks, chosen);
    }

    /** A stock that holds another is not given up before it. */
    public Draft withStocks(List<StockInHand> s) {
        return new Draft(
                name, title, bases, batchMl, moulds, overage, temperatureC, rows, tissue, limits, balance, s, chosen);
    }

    public Draft withChosen(Optional<List<String>> c) {
        return new Draft(
                name, title, bases, batchMl, moulds, overage, temperatureC, rows, tissue, limits, balance, stocks, c);
    }
}
