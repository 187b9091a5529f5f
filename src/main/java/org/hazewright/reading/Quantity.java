package org.hazewright.reading;

/** What a reading is of: its name in files and results, and its unit. */
public enum Quantity {
    SPECULAR_REFLECTANCE("specular_reflectance", "1"),
    DIFFUSE_REFLECTANCE("diffuse_reflectance", "1"),
    DIFFUSE_TRANSMITTANCE("diffuse_transmittance", "1"),
    UNSCATTERED_TRANSMITTANCE("unscattered_transmittance", "1"),
    TOTAL_REFLECTANCE("total_reflectance", "1"),
    TOTAL_TRANSMITTANCE("total_transmittance", "1"),
    REFLECTANCE_PER_MM2("reflectance_per_mm2", "1/mm2"),
    ATTENUATION_DB("attenuation_db", "dB"),
    MEAN_TIME_PS("mean_time_ps", "ps"),
    TIME_VARIANCE_PS2("time_variance_ps2", "ps2"),
    PHASE_DEG("phase_deg", "deg"),
    MODULATION("modulation", "1"),
    SATURATION("saturation", "1"),
    HAEMOGLOBIN_UMOL_PER_L("haemoglobin_umol_per_l", "umol/L"),
    APPARENT_MUA_PER_CM("apparent_mua_per_cm", "1/cm"),
    APPARENT_MUSP_PER_CM("apparent_musp_per_cm", "1/cm"),
    /** A curve over time; its unit is the curve's own. */
    TIME_CURVE("time_curve", "");

    private final String word;
    private final String unit;

    Quantity(String word, String unit) {
        this.word = word;
        this.unit = unit;
    }

    public String word() {
        return word;
    }

    public String unit() {
        return unit;
    }
}
