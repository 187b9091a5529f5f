package org.hazewright.files;

import java.nio.file.Path;
import org.hazewright.optics.SizeDistribution;

/** A sizing table: columns {@code from_nm}, {@code to_nm}, {@code weight} (by number); bins ascend and touch each other. */
public final class SizeTable {
    private SizeTable() {}

    public static SizeDistribution.Histogram read(Path file) {
        return histogram(CsvTable.read(file));
    }

    static SizeDistribution.Histogram histogram(CsvTable csv) {
        csv.refuseUnknown("from_nm", "to_nm", "weight");
        csv.refuseNegative("weight");
        double[] from = csv.column("from_nm");
        double[] to = csv.column("to_nm");
        double[] weights = csv.column("weight");
        double[] edges = new double[weights.length + 1];
        edges[0] = from[0];
        if (from[0] < 0)
            throw csv.at(0).refusal("from_nm is " + TomlPage.plain(from[0]) + " in this row; it must be 0 or above.");
        for (int i = 0; i < weights.length; i++) {
            if (to[i] <= from[i])
                throw csv.at(i)
                        .refusal("This bin goes from " + TomlPage.plain(from[i]) + " to " + TomlPage.plain(to[i])
                                + " nm; to_nm must be above from_nm.");
            if (i > 0 && from[i] != to[i - 1])
                throw csv.at(i)
                        .refusal("This bin begins at " + TomlPage.plain(from[i]) + " nm and the one before ends at "
                                + TomlPage.plain(to[i - 1])
                                + " nm; bins must touch. Add an empty bin of weight 0, or correct the edge.");
            edges[i + 1] = to[i];
        }
        return csv.atHeader().of(() -> new SizeDistribution.Histogram(edges, weights));
    }
}
