package org.hazewright.learning;

import java.util.Optional;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Absorption;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Lot;
import org.hazewright.shelf.Scattering;
import org.hazewright.shelf.Source;
import org.hazewright.shelf.Uncertainty;

/**
 * An ingredient as one of its lots, with the figures that a measurement gave it: all else stays as its parent's file says.
 *
 * @param id of the new lot's file, {@code lot} its table, {@code source} who measured it and when
 */
public record NewLot(String id, Lot lot, Source source) {

    /** With its parent's figures, known as well as is said. */
    public Ingredient of(Ingredient parent, Uncertainty u) {
        return made(parent, u, parent.absorption(), parent.scattering());
    }

    /** Of an absorber: its extinction as fitted, {@code g} of the scattered share. */
    public Ingredient absorber(Ingredient parent, DilutionFit fit, double g) {
        Uncertainty fitted = fit.uncertainty();
        // Scattering of its own model was not measured here and keeps its uncertainty.
        boolean onlyExtinction =
                fit.series().albedo() > 0 && parent.scattering().isEmpty();
        Uncertainty u = onlyExtinction
                ? fitted
                : new Uncertainty(fitted.absorption(), parent.uncertainty().scattering());
        return made(parent, u, Optional.of(fit.absorption(id, g)), parent.scattering());
    }

    /** Of a scatterer: its magnitude multiplied by measured over modelled; the shape stays the model's. */
    public Ingredient scatterer(Ingredient parent, DilutionFit.Magnitude magnitude) {
        Scattering model = parent.scattering()
                .orElseThrow(
                        () -> new Refusal(parent.id() + " has no scattering model whose magnitude could be measured."));
        Uncertainty u = new Uncertainty(parent.uncertainty().absorption(), magnitude.u() / magnitude.ratio());
        return made(parent, u, parent.absorption(), Optional.of(model.scaled(magnitude.ratio())));
    }

    /**
     * Of any ingredient after an update: its figures multiplied by the factors' means, its uncertainties theirs. A table of extinction E
     * with albedo a becomes E ((1 − a) θa + a θs) with albedo a θs over that, so that both shares are multiplied by their own factor; what particles absorb
     * by their own index is multiplied by θa.
     */
    public Ingredient learned(Ingredient parent, Factors after) {
        Uncertainty u = after.uncertainty(parent);
        double ofA = after.mean(Factor.of(parent, Quantity.ABSORPTION));
        double ofS = after.mean(Factor.of(parent, Quantity.SCATTERING));
        Optional<Absorption> absorption = parent.absorption().map(a -> {
            double whole = (1 - a.albedo()) * ofA + a.albedo() * ofS;
            return new Absorption(a.table(), a.basis(), a.perTableUnit() * whole, a.albedo() * ofS / whole, a.g());
        });
        return made(parent, u, absorption, parent.scattering().map(s -> learned(s, ofA, ofS)));
    }

    private static Scattering learned(Scattering s, double ofA, double ofS) {
        Scattering scaled = s.scaled(ofS);
        if (!(scaled instanceof Scattering.MieParticles mie) || !absorbs(mie)) return scaled;
        return mie.absorbing(ofA);
    }

    /** Whether particles absorb by their own index, at nine wavelengths of its range. */
    private static boolean absorbs(Scattering.MieParticles mie) {
        var index = mie.particle().index();
        for (int i = 0; i <= 8; i++)
            if (index.at(index.fromNm() + (index.toNm() - index.fromNm()) * i / 8, 20)
                            .k()
                    > 0) return true;
        return false;
    }

    private Ingredient made(
            Ingredient p, Uncertainty u, Optional<Absorption> absorption, Optional<Scattering> scattering) {
        return new Ingredient(
                id,
                p.name(),
                p.part(),
                p.families(),
                p.form(),
                p.densityGPerMl(),
                p.maxGPerMl(),
                p.pricePerG(),
                p.settles(),
                p.leastShare(),
                p.handling(),
                p.conflicts(),
                p.cautions(),
                source,
                u,
                absorption,
                scattering,
                p.index(),
                p.blend(),
                p.making(),
                Optional.of(lot));
    }
}
