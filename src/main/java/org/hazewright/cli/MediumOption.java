package org.hazewright.cli;

import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import org.hazewright.optics.Refusal;
import org.hazewright.reading.Spread;
import org.hazewright.shelf.Nearest;
import org.hazewright.transport.Medium;

/** A medium typed on the command line: {@code mua_per_cm=0.1,musp_per_cm=10,g=0.8,n=1.4}, with u_mua_per_cm and u_musp_per_cm if known. */
record MediumOption(Medium medium, Spread spread) {
    private static final List<String> NEEDED = List.of("mua_per_cm", "musp_per_cm", "g", "n");
    private static final List<String> KNOWN =
            List.of("mua_per_cm", "musp_per_cm", "g", "n", "u_mua_per_cm", "u_musp_per_cm");
    private static final String LIKE = " Write it like mua_per_cm=0.1,musp_per_cm=10,g=0.8,n=1.4.";

    static MediumOption of(String text) {
        Map<String, Double> values = new LinkedHashMap<>();
        for (String part : text.split(",", -1)) {
            int equals = part.indexOf('=');
            if (equals < 0) throw new Refusal("--medium holds \"" + part + "\", which is not name=value." + LIKE);
            String key = part.substring(0, equals).strip();
            if (!KNOWN.contains(key))
                throw new Refusal("--medium holds \"" + key + "\", which is not known."
                        + Nearest.to(key, KNOWN)
                                .map(n -> " Perhaps " + n + " is meant.")
                                .orElse(LIKE));
            if (values.put(key, number(key, part.substring(equals + 1).strip())) != null)
                throw new Refusal("--medium names " + key + " twice; name it once.");
        }
        for (String key : NEEDED)
            if (!values.containsKey(key)) throw new Refusal("--medium does not say " + key + "." + LIKE);
        boolean known = values.containsKey("u_mua_per_cm") || values.containsKey("u_musp_per_cm");
        return new MediumOption(
                new Medium(values.get("mua_per_cm"), values.get("musp_per_cm"), values.get("g"), values.get("n")),
                known
                        ? new Spread(
                                values.getOrDefault("u_mua_per_cm", 0.0), values.getOrDefault("u_musp_per_cm", 0.0))
                        : null);
    }

    private static double number(String key, String text) {
        try {
            return Double.parseDouble(text);
        } catch (NumberFormatException e) {
            throw new Refusal(
                    "--medium gives " + key + " as \"" + text + "\"; it must be a number with a decimal point.");
        }
    }
}
