package org.hazewright.sheet;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.function.Supplier;
import org.hazewright.bench.Answer;
import org.hazewright.brief.Mould;
import org.hazewright.brief.Tissue;
import org.hazewright.files.SetUpReader;
import org.hazewright.mixture.Recipe;
import org.hazewright.optics.Refusal;
import org.hazewright.reading.Adapted;
import org.hazewright.reading.Body;
import org.hazewright.reading.Foreseen;
import org.hazewright.reading.Foresight;
import org.hazewright.reading.HaemoglobinEquivalent;
import org.hazewright.reading.Oximeter;
import org.hazewright.reading.Phantom;
import org.hazewright.reading.SetUp;
import org.hazewright.transport.DiffusionRange;

/**
 * What the set-ups that come with the program show on a recipe, as far as that is quick: by diffusion and tables, never by transport
 * or photon packets. {@code leftOut} says in sentences what is not here and why.
 */
public record InstrumentReadings(Phantom phantom, List<Foreseen> foreseen, List<String> leftOut) {

    public InstrumentReadings {
        foreseen = List.copyOf(foreseen);
        leftOut = List.copyOf(leftOut);
    }

    public static InstrumentReadings of(Answer answer, Supplier<Tissue.Spectra> tables) {
        Body body = answer.brief().moulds().stream()
                .findFirst()
                .map(InstrumentReadings::body)
                .orElse(null);
        return of(answer.recipe(), body, tables);
    }

    static InstrumentReadings of(Recipe recipe, Body body, Supplier<Tissue.Spectra> tables) {
        Phantom phantom = Phantom.of(recipe, body);
        List<SetUp> setUps =
                SetUpReader.shipped().stream().map(SetUpReader::readShipped).toList();
        record Tried(Foreseen foreseen, String leftOut) {}
        List<Tried> tried = setUps.parallelStream()
                .map(s -> {
                    Optional<String> gap = phantom.gap(s);
                    if (gap.isPresent()) return new Tried(null, s.title() + ": " + gap.get());
                    if (s.kind() == SetUp.Kind.SLAB)
                        return new Tried(
                                null,
                                s.title() + ": transport takes its time; the command hazewright readings has it.");
                    try {
                        SetUp placed = phantom.placed(s);
                        if (needsPackets(phantom, placed))
                            return new Tried(
                                    null,
                                    s.title()
                                            + ": diffusion does not hold there; the command hazewright readings follows photon packets.");
                        boolean quick = !placed.distancesMm().isEmpty();
                        SetUp here = quick ? Adapted.byModel(s, SetUp.ModelChoice.DIFFUSION) : s;
                        return new Tried(Foreseen.of(phantom, here, running(phantom, here, tables)), null);
                    } catch (Refusal nothing) {
                        return new Tried(null, s.title() + ": " + nothing.getMessage());
                    }
                })
                .toList();
        List<Foreseen> foreseen = new ArrayList<>();
        List<String> leftOut = new ArrayList<>();
        for (Tried t : tried) {
            if (t.foreseen() != null) foreseen.add(t.foreseen());
            else leftOut.add(t.leftOut());
        }
        return new InstrumentReadings(phantom, foreseen, leftOut);
    }

    /**
     * What a recipe for a tissue-like brief comes to as blood: its µa less the brief's water and fat, at the brief's tissue
     * wavelengths. Empty for other briefs, and where those wavelengths cannot tell the two haemoglobins apart.
     */
    public static Optional<HaemoglobinEquivalent> haemoglobin(Answer answer, Supplier<Tissue.Spectra> tables) {
        if (answer.brief().tissue().isEmpty()) return Optional.empty();
        Tissue tissue = answer.brief().tissue().get();
        Tissue.Spectra read = tables.get();
        double[] nm = tissue.wavelengthsNm();
        double[] mua =
                Arrays.stream(nm).map(at -> answer.mixture().at(at).muaPerCm()).toArray();
        Oximeter oximeter = new Oximeter(
                "the brief's tissue, its water and fat taken off",
                read.oxyEpsilon(),
                read.deoxyEpsilon(),
                at -> tissue.bloodlessPerCm(at, read));
        try {
            return Optional.of(HaemoglobinEquivalent.of(oximeter, nm, mua, answer.budget()));
        } catch (Refusal alike) {
            return Optional.empty();
        }
    }

    private static Foresight running(Phantom phantom, SetUp setUp, Supplier<Tissue.Spectra> tables) {
        Foresight plain = Foresight.of(phantom::medium);
        if (setUp.kind() != SetUp.Kind.OXIMETER) return plain;
        Tissue.Spectra read = tables.get();
        return plain.with(phantom.oximeter(read.oxyEpsilon(), read.deoxyEpsilon()));
    }

    /** The body of a mould, for light. */
    public static Body body(Mould m) {
        return m.shape() == Mould.Shape.BOX
                ? Body.box(m.lengthMm(), m.widthMm(), m.heightMm())
                : Body.cylinder(m.lengthMm(), m.heightMm());
    }

    /** Some distance lies outside diffusion's range. */
    private static boolean needsPackets(Phantom phantom, SetUp s) {
        if (s.model() == SetUp.ModelChoice.PACKETS) return true;
        boolean inTime = s.kind() == SetUp.Kind.TIME || s.kind() == SetUp.Kind.FREQUENCY;
        for (double nm : s.wavelengthsNm())
            for (double mm : s.distancesMm())
                if (DiffusionRange.outside(
                                phantom.medium(nm),
                                mm,
                                s.thicknessMm(),
                                inTime,
                                s.convention().form())
                        != null) return true;
        return false;
    }
}
