package org.hazewright.search;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import org.hazewright.optics.Refusal;
import org.hazewright.search.LimitProof.Loosening;
import org.hazewright.search.LimitProof.Pull;
import org.hazewright.search.LimitProof.Relaxation;
import org.hazewright.search.SetProblem.Candidate;
import org.hazewright.search.SetProblem.Conflict;
import org.hazewright.search.SetProblem.Group;
import org.hazewright.search.SetProblem.Limits;
import org.hazewright.search.SetProblem.Point;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.EnumSource;

class LimitProofTest {
    private static final double OPEN = Double.POSITIVE_INFINITY;

    private static Candidate dye(double upper, double... effect) {
        return new Candidate(effect, 0, 0, upper, 0.01, Group.ABSORBER);
    }

    private static LimitProof proof(SetProblem p) {
        return new LimitProof(p, new SetSearch(p).leastWorstMiss(() -> false));
    }

    /** Two flat targets a factor apart, one flat dye: c = 1.5, both 5 tolerances off, half the weight each. */
    @Test
    void namesTargetsThatPullApart() {
        SetProblem p = new SetProblem(
                List.of(new Point(1, 0.1, 1), new Point(2, 0.1, 1), new Point(1.5, 0.5, 1)),
                List.of(dye(OPEN, 1, 1, 1), dye(OPEN, 0, 1, 0.5)),
                new Limits(1, 0, 0, 1, 0.9, List.of()));
        LimitProof proof = proof(p);
        assertEquals(List.of(new Pull(0, 0.5), new Pull(1, -0.5)), proof.conflict());
        Relaxation more = proof.oneMore(Group.ABSORBER);
        assertEquals(5, more.before(), 1e-12);
        assertEquals(0, more.after().value(), 1e-12);
        assertEquals(2, more.after().members().length);
        // Without the first target: (2 − c)/0.1 = (c − 1.5)/0.5, worst miss 5/6.
        assertEquals(5.0 / 6, proof.targetLeftOut(0).after().value(), 1e-12);
        assertEquals(0, proof.alone(0), 1e-12);
        List<Relaxation> helps = proof.whatHelps();
        assertEquals(Loosening.ONE_MORE, helps.get(0).loosening());
        assertEquals(3, helps.size());
        for (int k = 1; k < helps.size(); k++)
            assertTrue(helps.get(k).gain() <= helps.get(k - 1).gain());
    }

    /** The base absorbs 0.43 where 0.30 ± 0.015 is wanted and everything on the shelf absorbs more: no set comes closer. */
    @Test
    void baseAboveTarget() {
        SetProblem p = new SetProblem(
                List.of(new Point(0.30 - 0.43, 0.015, 1), new Point(0.1, 0.01, 1)),
                List.of(dye(OPEN, 0.4, 2), dye(OPEN, 3, 1)),
                new Limits(2, 0, 0, 2, 0.9, List.of()));
        LimitProof proof = proof(p);
        assertEquals(0.13 / 0.015, proof.alone(0), 1e-12);
        assertEquals(0, proof.alone(1), 1e-12);
        assertEquals(0, proof.conflict().get(0).point());
        assertTrue(proof.conflict().get(0).weight() > 0);
        List<Relaxation> helps = proof.whatHelps();
        assertEquals(Loosening.TARGET_LEFT_OUT, helps.get(0).loosening());
        assertEquals(0, helps.get(0).index());
        assertEquals(0, helps.get(0).after().value(), 1e-9);
    }

    /** An upper limit of half of what is needed: binding, and lifting it solves the matter. */
    @Test
    void bindingUpperLimit() {
        SetProblem p = new SetProblem(
                List.of(new Point(1, 0.1, 1)),
                List.of(dye(0.5, 1), dye(OPEN, -1)),
                new Limits(2, 0, 0, 2, 0.9, List.of()));
        LimitProof proof = proof(p);
        assertEquals(List.of(0), proof.bindingUppers());
        assertFalse(proof.volumeBinds());
        Relaxation lifted = proof.upperLifted(0);
        assertEquals(5, lifted.before(), 1e-12);
        assertEquals(0, lifted.after().value(), 1e-12);
    }

    /** Volume: a bulky thinner fills its share and the base's least share binds; a tenth more volume buys what the dual says. */
    @Test
    void bindingVolume() {
        Candidate bulky = new Candidate(new double[] {-0.4}, 0, 0, OPEN, 1, Group.MODIFIER);
        List<Point> points = List.of(new Point(-0.3, 0.02, 1));
        SetProblem p = new SetProblem(points, List.of(bulky), new Limits(1, 1, 1, 1, 0.5, List.of()));
        LimitProof proof = proof(p);
        assertTrue(proof.volumeBinds());
        assertTrue(proof.bindingUppers().isEmpty());
        Relaxation lifted = proof.baseShareLifted();
        assertEquals((0.3 - 0.2) / 0.02, lifted.before(), 1e-12);
        assertEquals(0, lifted.after().value(), 1e-12);
        LeastWorstMiss least = new SetSearch(p).leastWorstMiss(() -> false);
        SetProblem roomier = new SetProblem(points, List.of(bulky), new Limits(1, 1, 1, 1, 0.6, List.of()));
        double fallen = least.value()
                - new SetSearch(roomier).leastWorstMiss(() -> false).value();
        assertEquals(fallen, least.volumeWeight() * 0.1, 1e-12);
    }

    @Test
    void conflictsSetAside() {
        SetProblem p = new SetProblem(
                List.of(new Point(1, 0.1, 1), new Point(1, 0.1, 1)),
                List.of(dye(OPEN, 1, 0), dye(OPEN, 0, 1)),
                new Limits(2, 0, 0, 2, 0.9, List.of(new Conflict(0, 1))));
        Relaxation r = proof(p).conflictsLifted(1);
        assertEquals(10, r.before(), 1e-12);
        assertEquals(0, r.after().value(), 1e-12);
        assertTrue(proof(p).whatHelps().stream().anyMatch(h -> h.loosening() == Loosening.CONFLICTS_LIFTED));
    }

    @Test
    void theOnlyTargetStays() {
        SetProblem p = new SetProblem(List.of(new Point(1, 0.1, 1)), List.of(), new Limits(1, 1, 1, 1, 0.5, List.of()));
        assertThrows(Refusal.class, () -> proof(p).targetLeftOut(0));
        assertTrue(proof(p).whatHelps().isEmpty());
    }

    /** Loosening never hurts, and each gain is what exhaustion of the relaxed problem gives. */
    @ParameterizedTest
    @EnumSource(RandomProblems.Twist.class)
    void gainsAreThoseOfTheRelaxedProblem(RandomProblems.Twist twist) {
        for (int seed = 1; seed <= 3; seed++) {
            SetProblem p = RandomProblems.of(twist, 7, 2, 2, 0.5, seed);
            LimitProof proof = proof(p);
            for (Group g : Group.values()) {
                Relaxation r = proof.oneMore(g);
                SetProblem relaxed =
                        new SetProblem(p.points(), p.candidates(), p.limits().oneMore(g));
                double worst = Double.POSITIVE_INFINITY;
                for (int[] set : BruteForce.sets(relaxed))
                    worst = Math.min(worst, BruteForce.leastWorstMiss(relaxed, set));
                assertEquals(worst, r.after().value(), 1e-6 * (1 + worst));
            }
            for (Relaxation r : proof.whatHelps()) assertTrue(r.gain() > 0.01);
            double sum = 0;
            for (Pull pull : proof.conflict()) sum += Math.abs(pull.weight());
            assertEquals(1, sum, 1e-6);
        }
    }
}
