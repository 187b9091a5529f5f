package org.hazewright.reading;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.concurrent.ConcurrentHashMap;
import org.hazewright.mixture.Budget;
import org.hazewright.mixture.Coefficients;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.hazewright.optics.Refusal;
import org.hazewright.optics.Spectrum;
import org.hazewright.transport.Medium;
import org.hazewright.transport.SideWalls;

/**
 * A phantom as instruments meet it: a recipe's medium with its uncertainty at each wavelength (nm), or one medium for all, and the
 * body it is cast in, when that is known.
 *
 * <p>u(µa) and u(µs') are the recipe's budget at the wavelength. For an oximeter, which needs several wavelengths, every cause of
 * the budget is carried through by itself, so that what is common to all wavelengths stays common.
 */
public final class Phantom {
    private static final double MOST_FORWARD = 0.99;

    private final Recipe recipe;
    private final Mixture mixture;
    private final Set<String> baseIds = new HashSet<>();
    private final Medium everywhere;
    private final Spread spreadEverywhere;
    private final Body body;
    private final Map<Double, Medium> media = new ConcurrentHashMap<>();
    private final Map<Double, Spread> spreads = new ConcurrentHashMap<>();

    private Phantom(Recipe recipe, Medium everywhere, Spread spreadEverywhere, Body body) {
        this.recipe = recipe;
        this.mixture = recipe == null ? null : Mixture.of(recipe);
        this.everywhere = everywhere;
        this.spreadEverywhere = spreadEverywhere;
        this.body = body;
        if (recipe == null) return;
        baseIds.add(recipe.base().kind());
        recipe.base().blend().forEach(part -> baseIds.add(part.ingredient()));
    }

    /** {@code body} is null where it is not known: then set-ups keep their own thickness. */
    public static Phantom of(Recipe recipe, Body body) {
        return new Phantom(recipe, null, null, body);
    }

    /** The same medium at every wavelength; {@code spread} null when its uncertainty is not known. */
    public static Phantom of(Medium medium, Spread spread, Body body) {
        return new Phantom(null, medium, spread, body);
    }

    public boolean isRecipe() {
        return recipe != null;
    }

    public Optional<Body> body() {
        return Optional.ofNullable(body);
    }

    /** Where g is above 0.99, a medium of g = 0.99 and the same µs' stands in. */
    public Medium medium(double nm) {
        return recipe == null ? everywhere : media.computeIfAbsent(nm, this::mixed);
    }

    private Medium mixed(double nm) {
        Coefficients c = mixture.at(nm);
        return new Medium(c.muaPerCm(), c.muspPerCm(), Math.min(MOST_FORWARD, c.g()), c.boundaryIndex());
    }

    /** Null where nothing is known. */
    public Spread spread(double nm) {
        return recipe == null ? spreadEverywhere : spreads.computeIfAbsent(nm, this::budgeted);
    }

    private Spread budgeted(double nm) {
        Budget budget = Budget.of(recipe, new double[] {nm}, Double.MAX_VALUE);
        return new Spread(budget.uMuaPerCm()[0], budget.uMuspPerCm()[0]);
    }

    /** What the base absorbs in the finished phantom, 1/cm; 0 for a medium whose base is not known. */
    public double basePerCm(double nm) {
        if (recipe == null) return 0;
        double sum = 0;
        for (Coefficients.Share share : mixture.at(nm).shares())
            if (baseIds.contains(share.ingredient().kind())) sum += share.muaPerCm();
        return sum;
    }

    /** Why a set-up's wavelengths cannot be foreseen: some ingredient's figures do not reach one of them. */
    public Optional<String> gap(SetUp setUp) {
        if (recipe == null) return Optional.empty();
        for (double nm : setUp.wavelengthsNm())
            try {
                mixture.requireFigures(nm);
            } catch (Refusal outside) {
                return Optional.of(outside.getMessage());
            }
        return Optional.empty();
    }

    /** The set-up on this body. */
    public SetUp placed(SetUp setUp) {
        return body == null ? setUp : Adapted.onThickness(setUp, body.thicknessMm());
    }

    /** An oximeter that takes the base's absorption off and reads the rest with these extinction tables. */
    public Oximeter oximeter(Spectrum oxy, Spectrum deoxy) {
        String name = "haemoglobin tables, " + (recipe == null ? "nothing taken off" : "the base's own µa taken off");
        return new Oximeter(name, oxy, deoxy, this::basePerCm);
    }

    /**
     * What a set-up shows on this phantom. {@code running} brings threads, progress, stop and the oximeter; its medium and
     * uncertainty are not asked.
     */
    public List<Reading> read(SetUp setUp, Foresight running) {
        SetUp here = placed(setUp);
        Foresight mine = new Foresight(
                this::medium,
                here.kind() == SetUp.Kind.OXIMETER && recipe != null ? nm -> null : this::spread,
                running.oximeter(),
                running.threads(),
                running.progress(),
                running.stop());
        List<Reading> readings = new ArrayList<>();
        for (Reading r : Readings.of(here, mine)) readings.add(withWalls(here, r));
        if (here.kind() == SetUp.Kind.OXIMETER && recipe != null) carry(here, running.oximeter(), readings);
        return readings;
    }

    /**
     * The signal of a set-up with distances by diffusion alone, at {@code points} distances around its own, for a drawing; empty for
     * other kinds and where diffusion has nothing to say.
     */
    public List<Reading> line(SetUp setUp, int points) {
        if (!setUp.kind().hasDistances() || setUp.kind() == SetUp.Kind.TIME) return List.of();
        SetUp here = placed(setUp);
        double least = here.distancesMm().stream().mapToDouble(mm -> mm).min().orElseThrow();
        double most = here.distancesMm().stream().mapToDouble(mm -> mm).max().orElseThrow();
        List<Double> mm = new ArrayList<>();
        for (int i = 0; i < points; i++) mm.add(0.4 * least + (1.15 * most - 0.4 * least) * i / (points - 1));
        try {
            return Readings.of(Adapted.alongDistances(here, mm), this::medium);
        } catch (Refusal nothing) {
            return List.of();
        }
    }

    private Reading withWalls(SetUp setUp, Reading r) {
        boolean spreads = setUp.kind().hasDistances() || setUp.kind() == SetUp.Kind.SLAB;
        if (body == null || !spreads || Double.isInfinite(body.wallMm()) || r.wavelengthNm() == null) return r;
        double farthest = r.distanceMm() != null
                ? r.distanceMm()
                : setUp.distancesMm().stream().mapToDouble(mm -> mm).max().orElse(0);
        return r.withNote(SideWalls.note(medium(r.wavelengthNm()), body.wallMm(), farthest));
    }

    /** Standard uncertainties of an oximeter's readings, cause by cause (JCGM 100:2008, eq. 10). */
    private void carry(SetUp setUp, Oximeter oximeter, List<Reading> readings) {
        double[] nm = setUp.wavelengthsNm().stream().mapToDouble(x -> x).toArray();
        double[] mua = new double[nm.length];
        for (int j = 0; j < nm.length; j++) mua[j] = medium(nm[j]).muaPerCm();
        double[] ascending = Arrays.stream(nm).sorted().toArray();
        HaemoglobinEquivalent h =
                HaemoglobinEquivalent.of(oximeter, nm, mua, Budget.of(recipe, ascending, Double.MAX_VALUE));
        for (int i = 0; i < readings.size(); i++) {
            Reading r = readings.get(i);
            double u = r.quantity() == Quantity.SATURATION ? h.uSaturation() : h.uUmolPerL();
            readings.set(
                    i,
                    new Reading(
                            r.setUp(),
                            r.kind(),
                            null,
                            null,
                            r.quantity(),
                            r.value(),
                            u,
                            null,
                            r.model(),
                            r.insideRange(),
                            r.note()));
        }
    }
}
