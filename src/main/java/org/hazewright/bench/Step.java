package org.hazewright.bench;

import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;

/**
 * One thing to do at the bench.
 *
 * @param text what to do, an imperative sentence with its grams
 * @param weighing the mass that it weighs, when it weighs one
 * @param loadsG the loads on the balance that the mass is weighed in; empty when nothing is weighed
 * @param allowed lowest and highest grams allowed, when the targets are known
 * @param volumeMl the mass as a volume, for liquids
 * @param temperatureC at which it is done, when a file gives it
 * @param minutes how long it takes, when a file gives it
 * @param handling how to treat the ingredient, from its file
 * @param cautions what can hurt or spoil here
 */
public record Step(
        Stage stage,
        String text,
        Optional<Weighing> weighing,
        List<Double> loadsG,
        Optional<Allowed> allowed,
        OptionalDouble volumeMl,
        OptionalDouble temperatureC,
        OptionalDouble minutes,
        List<String> handling,
        List<String> cautions) {

    /** Part of the work that a step belongs to; its heading on a sheet. */
    public enum Stage {
        STOCKS("Make the stocks"),
        BASE("Prepare the base"),
        ADD("Add"),
        FINISH("Finish");

        private final String heading;

        Stage(String heading) {
            this.heading = heading;
        }

        public String heading() {
            return heading;
        }
    }

    /** The band of a weighing, g. */
    public record Allowed(double lowG, double highG) {}

    public Step {
        loadsG = List.copyOf(loadsG);
        handling = List.copyOf(handling);
        cautions = List.copyOf(cautions);
    }
}
