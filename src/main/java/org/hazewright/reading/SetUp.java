package org.hazewright.reading;

import java.util.List;
import org.hazewright.optics.Refusal;
import org.hazewright.transport.Convention;
import org.hazewright.transport.Response;
import org.hazewright.transport.TimeAxis;

/**
 * A measurement as it will be set up: what is read, at which wavelengths and distances, and by which model it is foreseen.
 *
 * <p>Mirrors the set-up file. Wavelengths in nm; distances in mm above 0, at most 1000 of each; {@code modulationMhz}, {@code
 * time}, {@code response}, {@code counts} and {@code thicknessMm} are null where the kind has no use for them; null thickness
 * means semi-infinite. Made with {@link #of(String, Kind)}; the constructor refuses what the kind cannot use.
 */
public record SetUp(
        String title,
        Kind kind,
        List<Double> wavelengthsNm,
        double outsideIndex,
        List<Double> distancesMm,
        Double modulationMhz,
        TimeAxis time,
        Response response,
        Double counts,
        Double thicknessMm,
        ModelChoice model,
        long packets,
        long seed,
        Convention convention) {

    /** What is read. */
    public enum Kind {
        /** Steady diffuse reflectance at distances. */
        REFLECTANCE("reflectance"),
        /** The same at several distances, analysed by its slope. */
        SLOPE("slope"),
        /** Amplitude and phase of modulated light. */
        FREQUENCY("frequency"),
        /** Curve of a short pulse. */
        TIME("time"),
        /** Total reflectance and transmittance, as an integrating sphere sees them. */
        SLAB("slab"),
        /** Collimated transmission. */
        COLLIMATED("collimated"),
        /** Haemoglobin-equivalent saturation. */
        OXIMETER("oximeter");

        private final String word;

        Kind(String word) {
            this.word = word;
        }

        public String word() {
            return word;
        }

        boolean hasDistances() {
            return this == REFLECTANCE || this == SLOPE || this == FREQUENCY || this == TIME;
        }
    }

    /** Which model is asked for. */
    public enum ModelChoice {
        AUTO("auto"),
        DIFFUSION("diffusion"),
        TRANSPORT("transport"),
        PACKETS("packets");

        private final String word;

        ModelChoice(String word) {
            this.word = word;
        }

        public String word() {
            return word;
        }
    }

    public SetUp {
        if (title == null || title.isBlank()) throw new Refusal("The set-up has no title; give it one.");
        if (kind == null || model == null || convention == null)
            throw new Refusal("The set-up \"" + title + "\" needs a kind, a model and a convention.");
        wavelengthsNm = List.copyOf(wavelengthsNm);
        distancesMm = List.copyOf(distancesMm);
        if (wavelengthsNm.isEmpty() || wavelengthsNm.size() > 1000)
            throw new Refusal(
                    "The set-up \"" + title + "\" has " + wavelengthsNm.size() + " wavelengths; it needs 1 to 1000.");
        for (double nm : wavelengthsNm) Refusal.within("Wavelength in nm", nm, 100, 20000);
        Refusal.within("Refractive index outside", outsideIndex, 1, 4);
        for (double mm : distancesMm) Refusal.within("Distance in mm", mm, 1e-3, 1e4);
        if (modulationMhz != null) Refusal.within("Modulation frequency in MHz", modulationMhz, 1e-3, 1e5);
        if (counts != null) Refusal.positive("Counts", counts);
        if (thicknessMm != null) Refusal.within("Thickness in mm", thicknessMm, 1e-3, 1e4);
        Refusal.within("Number of packets", packets, 1000, 1e10);
        checkKind(title, kind, wavelengthsNm.size(), distancesMm.size(), thicknessMm);
        checkExtras(title, kind, modulationMhz, time, response, counts);
        checkModel(title, kind, model);
    }

    private static void checkKind(String title, Kind kind, int wavelengths, int distances, Double thickness) {
        String of = "The set-up \"" + title + "\" of kind " + kind.word();
        if (kind.hasDistances()) {
            int least = kind == Kind.SLOPE ? 2 : 1;
            if (distances < least || distances > 1000)
                throw new Refusal(
                        of + " has " + distances + " distances; it needs " + least + " to 1000 in distances_mm.");
        } else if (distances > 0)
            throw new Refusal(of + " has no use for distances_mm; take them out, or choose another kind.");
        if ((kind == Kind.SLAB || kind == Kind.COLLIMATED) && thickness == null)
            throw new Refusal(of + " needs thickness_mm.");
        if (kind == Kind.OXIMETER && wavelengths < 2)
            throw new Refusal(of + " has 1 wavelength; two unknowns need at least 2.");
        if (kind == Kind.OXIMETER && thickness != null)
            throw new Refusal(of + " has no use for thickness_mm; take it out.");
    }

    private static void checkExtras(
            String title, Kind kind, Double modulation, TimeAxis time, Response response, Double counts) {
        String of = "The set-up \"" + title + "\" of kind " + kind.word();
        if ((kind == Kind.FREQUENCY) != (modulation != null))
            throw new Refusal(of
                    + (modulation == null ? " needs modulation_mhz." : " has no use for modulation_mhz; take it out."));
        if ((kind == Kind.TIME) != (time != null))
            throw new Refusal(of + (time == null ? " needs time_ps." : " has no use for time_ps; take it out."));
        if (kind != Kind.TIME && (response != null || counts != null))
            throw new Refusal(of + " has no use for response or counts; take them out.");
    }

    private static void checkModel(String title, Kind kind, ModelChoice model) {
        String of = "The set-up \"" + title + "\" of kind " + kind.word();
        if (kind.hasDistances() && model == ModelChoice.TRANSPORT)
            throw new Refusal(
                    of + " asks for model transport, which gives totals only; choose auto, diffusion or packets.");
        if ((kind == Kind.COLLIMATED || kind == Kind.OXIMETER) && model != ModelChoice.AUTO)
            throw new Refusal(of + " asks for model " + model.word() + ", but uses none of them; leave model out.");
    }

    /** A set-up to be completed; what is not said stays at its default. */
    public static Draft of(String title, Kind kind) {
        return new Draft(title, kind);
    }

    /** The steps to a set-up; {@link #done} checks and gives it. */
    public static final class Draft {
        private final String title;
        private final Kind kind;
        private List<Double> wavelengthsNm = List.of();
        private double outsideIndex = 1;
        private List<Double> distancesMm = List.of();
        private Double modulationMhz;
        private TimeAxis time;
        private Response response;
        private Double counts;
        private Double thicknessMm;
        private ModelChoice model = ModelChoice.AUTO;
        private long packets = 1_000_000;
        private long seed = 1;
        private Convention convention = Convention.DEFAULT;

        private Draft(String title, Kind kind) {
            this.title = title;
            this.kind = kind;
        }

        public Draft wavelengthsNm(List<Double> nm) {
            wavelengthsNm = nm;
            return this;
        }

        public Draft outsideIndex(double n) {
            outsideIndex = n;
            return this;
        }

        public Draft distancesMm(List<Double> mm) {
            distancesMm = mm;
            return this;
        }

        public Draft modulationMhz(Double mhz) {
            modulationMhz = mhz;
            return this;
        }

        public Draft time(TimeAxis axis) {
            time = axis;
            return this;
        }

        public Draft response(Response measured) {
            response = measured;
            return this;
        }

        public Draft counts(Double total) {
            counts = total;
            return this;
        }

        public Draft thicknessMm(Double mm) {
            thicknessMm = mm;
            return this;
        }

        public Draft model(ModelChoice choice) {
            model = choice;
            return this;
        }

        public Draft packets(long count) {
            packets = count;
            return this;
        }

        public Draft seed(long number) {
            seed = number;
            return this;
        }

        public Draft convention(Convention choices) {
            convention = choices;
            return this;
        }

        public SetUp done() {
            return new SetUp(
                    title,
                    kind,
                    wavelengthsNm,
                    outsideIndex,
                    distancesMm,
                    modulationMhz,
                    time,
                    response,
                    counts,
                    thicknessMm,
                    model,
                    packets,
                    seed,
                    convention);
        }
    }
}
