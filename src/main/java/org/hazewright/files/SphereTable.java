package org.hazewright.files;

import java.nio.file.Path;

/**
 * Single spheres to compute, one a row: columns size_parameter, index and absorption_index, without unit and relative to the
 * host.
 */
public record SphereTable(double[] sizeParameter, double[] index, double[] absorptionIndex) {

    public static SphereTable read(Path file) {
        CsvTable table = CsvTable.read(file);
        table.refuseUnknown("size_parameter", "index", "absorption_index");
        return new SphereTable(table.column("size_parameter"), table.column("index"), table.column("absorption_index"));
    }

    public int rows() {
        return sizeParameter.length;
    }
}
