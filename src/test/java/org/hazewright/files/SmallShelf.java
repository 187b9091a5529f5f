package org.hazewright.files;

import java.nio.file.Path;

/** A shelf of a few files with made-up figures, for tests of reading. */
final class SmallShelf {
    static final String WATER = """
            format = 1
            id = "water"
            name = "Water"
            part = "base"
            family = "liquid"
            form = "liquid"
            density_g_per_ml = 0.998
            least_share = 0.5

            [source]
            basis = "memory"

            [uncertainty]
            absorption = 0.03

            [absorption]
            table = "spectra/water.csv"
            """;

    static final String GELATIN = """
            format = 1
            id = "gelatin-powder"
            name = "Gelatin powder"
            part = "modifier"
            families = ["liquid", "gel"]
            form = "powder"
            density_g_per_ml = 1.35

            [source]
            basis = "memory"
            """;

    static final String GEL = """
            format = 1
            id = "gelatin-10"
            name = "Gelatin, 10 %"
            part = "base"
            family = "gel"
            blend = [{ingredient = "water", mass_fraction = 0.9}, {ingredient = "gelatin-powder", mass_fraction = 0.1}]

            [source]
            basis = "memory"
            """;

    static final String INK = """
            format = 1
            id = "ink"
            name = "Ink"
            part = "absorber"
            families = ["liquid", "gel"]
            form = "liquid"
            density_g_per_ml = 1.02
            max_g_per_ml = 0.02
            price_per_g = 0
            settles = true
            handling = ["Shake."]
            cautions = ["Stains."]
            conflicts = [{with = "salt", why = "flocks"}, {with = "acid", why = "gas", refuse = true}]

            [source]
            basis = "invented"
            citation = "Made up."
            note = "Not a bottle."

            [uncertainty]
            absorption = 0.02
            scattering = 0.2
            correlation = 0.5

            [absorption]
            table = "spectra/ink.csv"
            albedo = 0.15
            g = 0.6

            [making]
            add_last = true
            stir_min = 5
            source = "common practice"
            """;

    static final String EMULSION = """
            format = 1
            id = "emulsion"
            name = "Emulsion"
            part = "scatterer"
            families = ["liquid", "gel"]
            form = "liquid"
            density_g_per_ml = 0.986
            index = "water"

            [source]
            basis = "published"
            citation = "An author, J. Test. 1, 1 (2000)."

            [uncertainty]
            scattering = 0.03

            [scattering]
            model = "mie"
            particle = "oil"
            particle_volume_fraction = 0.22
            crowding = "percus-yevick"

            [scattering.size]
            kind = "lognormal"
            number_median_diameter_nm = 200
            geometric_standard_deviation = 1.6
            """;

    static final String OIL = """
            format = 1
            id = "oil"
            name = "Oil"
            form = "constant"
            n = 1.47
            from_nm = 400
            to_nm = 1100

            [source]
            basis = "memory"
            """;

    static final String WATER_INDEX = """
            format = 1
            id = "water"
            name = "Water"
            form = "iapws-water"

            [source]
            basis = "published"
            citation = "IAPWS R9-97 (1997)."
            """;

    static final String LOT = """
            format = 1
            id = "emulsion-L07"
            lot_of = "emulsion"

            [lot]
            number = "L07"
            received = 2026-02-01
            expires = 2027-02-01

            [source]
            basis = "measured"
            citation = "The bench, 2026-02-03."

            [uncertainty]
            scattering = 0.01

            [scattering]
            magnitude = 1.04
            """;

    private SmallShelf() {}

    /** Writes all of them. */
    static Path in(Path folder) {
        Marked.write(folder.resolve("water.toml"), WATER);
        Marked.write(folder.resolve("gelatin-powder.toml"), GELATIN);
        Marked.write(folder.resolve("gelatin-10.toml"), GEL);
        Marked.write(folder.resolve("ink.toml"), INK);
        Marked.write(folder.resolve("emulsion.toml"), EMULSION);
        Marked.write(folder.resolve("emulsion-L07.toml"), LOT);
        Marked.write(folder.resolve("materials/oil.toml"), OIL);
        Marked.write(folder.resolve("materials/water.toml"), WATER_INDEX);
        Marked.write(folder.resolve("spectra/water.csv"), "wavelength_nm,mua_per_cm\n400,0.0001\n800,0.02\n1100,0.2\n");
        Marked.write(folder.resolve("spectra/ink.csv"), "wavelength_nm,mua_per_cm\n400,12000\n1100,4000\n");
        Marked.write(folder.resolve("README.md"), "Not an ingredient.");
        return folder;
    }
}
