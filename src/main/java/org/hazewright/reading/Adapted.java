package org.hazewright.reading;

import java.util.List;

/** A set-up with one thing changed; the rest, its title too, stays. */
public final class Adapted {
    private Adapted() {}

    /** On a phantom of this thickness in mm; oximeters and cuvettes have no use for it and stay as they are. */
    public static SetUp onThickness(SetUp s, double thicknessMm) {
        if (s.kind() == SetUp.Kind.OXIMETER || s.kind() == SetUp.Kind.COLLIMATED) return s;
        return copy(s, s.kind(), s.wavelengthsNm(), s.distancesMm(), thicknessMm, s.model());
    }

    public static SetUp atWavelengths(SetUp s, List<Double> nm) {
        return copy(s, s.kind(), nm, s.distancesMm(), s.thicknessMm(), s.model());
    }

    public static SetUp byModel(SetUp s, SetUp.ModelChoice model) {
        return copy(s, s.kind(), s.wavelengthsNm(), s.distancesMm(), s.thicknessMm(), model);
    }

    /** Its signal by diffusion over other distances in mm, without the analysis of a slope. */
    public static SetUp alongDistances(SetUp s, List<Double> mm) {
        SetUp.Kind kind = s.kind() == SetUp.Kind.SLOPE ? SetUp.Kind.REFLECTANCE : s.kind();
        return copy(s, kind, s.wavelengthsNm(), mm, s.thicknessMm(), SetUp.ModelChoice.DIFFUSION);
    }

    private static SetUp copy(
            SetUp s, SetUp.Kind kind, List<Double> nm, List<Double> mm, Double thicknessMm, SetUp.ModelChoice model) {
        return new SetUp(
                s.title(),
                kind,
                nm,
                s.outsideIndex(),
                mm,
                s.modulationMhz(),
                s.time(),
                s.response(),
                s.counts(),
                thicknessMm,
                model,
                s.packets(),
                s.seed(),
                s.convention());
    }
}
