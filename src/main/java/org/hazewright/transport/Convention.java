package org.hazewright.transport;

import org.hazewright.optics.Refusal;

/**
 * The choices that published diffusion formulas differ in; printed with every value that rests on them.
 *
 * <p>Defaults first in each enum: signal from fluence and flux, D with absorption, unit source, per power that entered.
 */
public record Convention(Form form, DiffusionConstant diffusion, SourceStrength sourceStrength, Per per) {
    public static final Convention DEFAULT =
            new Convention(Form.FLUX_AND_FLUENCE, DiffusionConstant.WITH_ABSORPTION, SourceStrength.UNIT, Per.ENTERED);

    public Convention {
        if (form == null || diffusion == null || sourceStrength == null || per == null)
            throw new Refusal(
                    "A convention needs form, diffusion, source strength and per; leave the whole table out for"
                            + " the defaults.");
    }

    /** What of the field is taken for the signal. */
    public enum Form {
        /** Integral of the radiance that leaves, Kienle &amp; Patterson 1997. */
        FLUX_AND_FLUENCE("flux-and-fluence"),
        /** Flux alone, Farrell, Patterson &amp; Wilson 1992; Contini et al. 1997 for the slab. */
        FLUX("flux");

        private final String word;

        Form(String word) {
            this.word = word;
        }

        public String word() {
            return word;
        }
    }

    /** Diffusion constant; the depth of the source, 1/(3D), follows. */
    public enum DiffusionConstant {
        /** D = 1/(3(µa + µs')). */
        WITH_ABSORPTION("with-absorption"),
        /** D = 1/(3µs'). */
        WITHOUT_ABSORPTION("without-absorption");

        private final String word;

        DiffusionConstant(String word) {
            this.word = word;
        }

        public String word() {
            return word;
        }
    }

    /** Strength of the isotropic source that stands for the beam. */
    public enum SourceStrength {
        /** One. */
        UNIT("unit"),
        /** a' = µs'/(µa + µs'). */
        ALBEDO("albedo");

        private final String word;

        SourceStrength(String word) {
            this.word = word;
        }

        public String word() {
            return word;
        }
    }

    /** The power to which a diffusion reading is referred. */
    public enum Per {
        /** What passed the surface. */
        ENTERED("entered"),
        /** What met the surface: smaller by the specular reflectance. */
        INCIDENT("incident");

        private final String word;

        Per(String word) {
            this.word = word;
        }

        public String word() {
            return word;
        }
    }

    /** In words, for print: "flux-and-fluence, D with absorption, unit source, per power entered". */
    public String inWords() {
        return form.word + ", D " + diffusion.word.replace('-', ' ') + ", " + sourceStrength.word
                + " source, per power " + per.word;
    }
}
