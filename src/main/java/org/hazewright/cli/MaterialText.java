package org.hazewright.cli;

import java.io.PrintWriter;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.stream.IntStream;
import org.hazewright.optics.Figures;
import org.hazewright.optics.Index;
import org.hazewright.optics.RefractiveIndex;
import org.hazewright.shelf.Material;

/** A material's refractive index as text or JSON, at 22 °C and every hundred nanometres. */
final class MaterialText {
    private static final double ROOM_C = 22;
    private static final double SODIUM_NM = 589.3;

    private MaterialText() {}

    /** ", 1.3331 at 589 nm", or nothing where the source does not reach the sodium line. */
    static String near589(Material m) {
        return m.index().covers(SODIUM_NM)
                ? ", n " + Figures.fixed(m.index().at(SODIUM_NM, ROOM_C).n(), 4) + " at 589 nm"
                : "";
    }

    static void print(Material m, boolean json, PrintWriter out) {
        RefractiveIndex index = m.index();
        double[] nm = IntStream.rangeClosed(4, 13)
                .mapToDouble(k -> 100.0 * k)
                .filter(index::covers)
                .toArray();
        if (json) {
            List<Map<String, Object>> rows = new ArrayList<>();
            for (double x : nm) {
                Index at = index.at(x, ROOM_C);
                rows.add(Json.object()
                        .with("wavelength_nm", x)
                        .with("n", at.n())
                        .with("k", at.k())
                        .fields());
            }
            Json.object()
                    .with("id", m.id())
                    .with("name", m.name())
                    .with("from_nm", index.fromNm())
                    .with("to_nm", index.toNm())
                    .with("basis", m.source().basis().word())
                    .with("citation", m.source().citation())
                    .with("index_at_22_c", rows)
                    .print(out);
            return;
        }
        out.println(m.name());
        out.println(m.id() + ": material, " + Figures.plain(index.fromNm()) + " to " + Figures.plain(index.toNm())
                + " nm, basis " + m.source().basis().word());
        out.println();
        TextTable table = new TextTable("  ", "rrr").row("nm", "n at 22 °C", "k");
        for (double x : nm) {
            Index at = index.at(x, ROOM_C);
            table.row(Figures.plain(x), Figures.fixed(at.n(), 4), at.k() == 0 ? "0" : Figures.significant(at.k(), 3));
        }
        table.print(out);
        out.println();
        out.println("Sources");
        out.println("  - " + m.source().citation());
    }
}
