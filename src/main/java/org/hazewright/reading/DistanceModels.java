package org.hazewright.reading;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import org.hazewright.transport.Boundary;
import org.hazewright.transport.Convention;
import org.hazewright.transport.Diffusion;
import org.hazewright.transport.DiffusionRange;
import org.hazewright.transport.Medium;
import org.hazewright.transport.PacketRun;
import org.hazewright.transport.PacketTally;
import org.hazewright.transport.PhotonPackets;
import org.hazewright.transport.Ring;
import org.hazewright.transport.Side;
import org.hazewright.transport.TimeAxis;

/**
 * For one medium and one set-up with distances: which model answers at which distance, and why.
 *
 * <p>Diffusion where its range holds, photon packets elsewhere (or whatever the set-up insists on). Packets run once, for all
 * the distances that want them, in rings a twentieth of the distance wide.
 */
final class DistanceModels {
    /** Half the width of a ring, as a share of its distance ρ: up to µeff ρ = 5 its average is within 0.5 % of the middle. */
    private static final double HALF_WIDTH = 0.025;
    /** A ring's value with a larger relative standard error than this is no answer. */
    private static final double WORST = 0.3;

    final SetUp setUp;
    final Medium medium;
    final Diffusion diffusion;
    private final String[] outside;
    private final PacketTally.InRing[] ring;
    private final boolean[] poor;
    private final double entered;

    DistanceModels(SetUp setUp, Medium medium, Foresight foresight, boolean inTime) {
        this.setUp = setUp;
        this.medium = medium;
        int n = setUp.distancesMm().size();
        outside = new String[n];
        ring = new PacketTally.InRing[n];
        poor = new boolean[n];
        diffusion = possible() ? diffusionOf(medium) : null;
        entered = setUp.convention().per() == Convention.Per.ENTERED
                ? 1 - new Boundary(medium.n(), setUp.outsideIndex()).normalReflectance()
                : 1;
        List<Integer> wanted = new ArrayList<>();
        for (int i = 0; i < n; i++) {
            outside[i] = DiffusionRange.outside(
                    medium,
                    setUp.distancesMm().get(i),
                    setUp.thicknessMm(),
                    inTime,
                    setUp.convention().form());
            boolean packets = setUp.model() == SetUp.ModelChoice.PACKETS
                    || (setUp.model() == SetUp.ModelChoice.AUTO && outside[i] != null);
            if (packets) wanted.add(i);
        }
        if (!wanted.isEmpty()) follow(wanted, foresight, inTime);
    }

    Diffusion diffusionOf(Medium other) {
        return new Diffusion(other, setUp.outsideIndex(), setUp.thicknessMm(), setUp.convention());
    }

    /** Diffusion can say something at all, if only as a guess. */
    private boolean possible() {
        if (setUp.model() == SetUp.ModelChoice.DIFFUSION) return true;
        if (medium.muspPerCm() == 0) return false;
        return setUp.thicknessMm() == null || setUp.thicknessMm() > 30 / medium.muspPerCm();
    }

    private void follow(List<Integer> wanted, Foresight foresight, boolean inTime) {
        List<Ring> rings = new ArrayList<>();
        for (int i : wanted) {
            double mm = setUp.distancesMm().get(i);
            rings.add(Ring.around(mm, HALF_WIDTH * mm));
        }
        PacketRun run = foresight.run(setUp).collecting(Side.REFLECTANCE, rings);
        if (inTime) run = run.over(timesFor());
        PacketTally tally = new PhotonPackets(medium, setUp.outsideIndex(), setUp.thicknessMm()).run(run);
        if (tally.packets() == 0) return;
        for (int k = 0; k < wanted.size(); k++) {
            PacketTally.InRing found = tally.rings().get(k);
            boolean enough = found.uPerMm2() <= WORST * found.perMm2();
            if (enough) ring[wanted.get(k)] = found;
            else poor[wanted.get(k)] = true;
        }
    }

    /** The set-up's own axis, or one fine enough for its modulation. */
    TimeAxis timesFor() {
        if (setUp.time() != null) {
            // from just before 0, and to where a response that begins before 0 still reaches
            TimeAxis t = setUp.time();
            double from = t.fromPs() - Math.ceil(t.fromPs() / t.stepPs()) * t.stepPs();
            double early =
                    setUp.response() == null ? 0 : Math.max(0, -setUp.response().timePs()[0]);
            return new TimeAxis(from, Math.max(t.toPs() + early, from + t.stepPs()), t.stepPs());
        }
        double period = 1e6 / setUp.modulationMhz();
        double step = Math.min(10, period / 400);
        return new TimeAxis(0, step * 5000, step);
    }

    double distanceMm(int i) {
        return setUp.distancesMm().get(i);
    }

    boolean byPackets(int i) {
        return ring[i] != null;
    }

    /** Nothing can be said: packets too few, and diffusion impossible. */
    boolean silent(int i) {
        return ring[i] == null && diffusion == null;
    }

    PacketTally.InRing ring(int i) {
        return ring[i];
    }

    /** Power to which packets' results are referred, per power that meets the surface. */
    double entered() {
        return entered;
    }

    String model(int i) {
        if (silent(i)) return "none";
        return byPackets(i) ? "packets" : "diffusion: " + setUp.convention().inWords();
    }

    boolean inside(int i) {
        return byPackets(i) || (!silent(i) && outside[i] == null);
    }

    String note(int i) {
        if (byPackets(i))
            return String.format(
                    Locale.ROOT,
                    "Averaged over a ring from %.4g to %.4g mm%s.",
                    ring[i].ring().innerMm(),
                    ring[i].ring().outerMm(),
                    setUp.convention().per() == Convention.Per.ENTERED
                            ? ", per power entered"
                            : ", per power incident");
        String few =
                poor[i] ? "Too few of the " + setUp.packets() + " packets arrive there; ask for more packets." : null;
        if (silent(i)) return few != null ? few : "The run of packets was stopped.";
        if (outside[i] == null) return few;
        return few == null ? outside[i] : outside[i] + " " + few;
    }
}
