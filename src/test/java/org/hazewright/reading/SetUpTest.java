package org.hazewright.reading;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import org.hazewright.optics.Refusal;
import org.junit.jupiter.api.Test;

class SetUpTest {
    private static SetUp.Draft of(SetUp.Kind kind) {
        return SetUp.of("Probe", kind).wavelengthsNm(List.of(690.0, 830.0));
    }

    @Test
    void defaultsAreTheContracts() {
        SetUp s = of(SetUp.Kind.REFLECTANCE).distancesMm(List.of(20.0)).done();
        assertEquals(1, s.outsideIndex());
        assertEquals(1_000_000, s.packets());
        assertEquals(1, s.seed());
        assertEquals(SetUp.ModelChoice.AUTO, s.model());
        assertEquals(
                "flux-and-fluence, D with absorption, unit source, per power entered",
                s.convention().inWords());
    }

    private static void refused(SetUp.Draft draft, String says) {
        Refusal r = assertThrows(Refusal.class, draft::done);
        assertTrue(r.getMessage().contains(says), r.getMessage());
    }

    @Test
    void eachKindSaysWhatItLacks() {
        refused(of(SetUp.Kind.REFLECTANCE), "distances_mm");
        refused(of(SetUp.Kind.SLOPE).distancesMm(List.of(20.0)), "it needs 2");
        refused(of(SetUp.Kind.FREQUENCY).distancesMm(List.of(20.0)), "modulation_mhz");
        refused(of(SetUp.Kind.TIME).distancesMm(List.of(20.0)), "time_ps");
        refused(of(SetUp.Kind.SLAB), "thickness_mm");
        refused(of(SetUp.Kind.COLLIMATED), "thickness_mm");
        refused(of(SetUp.Kind.OXIMETER).wavelengthsNm(List.of(690.0)), "at least 2");
    }

    @Test
    void eachKindSaysWhatItCannotUse() {
        refused(of(SetUp.Kind.SLAB).thicknessMm(5.0).distancesMm(List.of(3.0)), "no use for distances_mm");
        refused(of(SetUp.Kind.REFLECTANCE).distancesMm(List.of(3.0)).modulationMhz(100.0), "no use for modulation_mhz");
        refused(of(SetUp.Kind.SLAB).thicknessMm(5.0).counts(1e6), "no use for response or counts");
        refused(of(SetUp.Kind.REFLECTANCE).distancesMm(List.of(3.0)).model(SetUp.ModelChoice.TRANSPORT), "totals only");
        refused(of(SetUp.Kind.COLLIMATED).thicknessMm(5.0).model(SetUp.ModelChoice.PACKETS), "leave model out");
        refused(of(SetUp.Kind.REFLECTANCE).distancesMm(List.of(-3.0)), "Distance in mm");
        refused(of(SetUp.Kind.SLAB).thicknessMm(5.0).packets(10), "packets");
        refused(of(SetUp.Kind.SLAB).thicknessMm(5.0).outsideIndex(0.5), "Refractive index outside");
    }
}
