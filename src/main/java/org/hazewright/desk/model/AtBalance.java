package org.hazewright.desk.model;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import javafx.beans.property.ReadOnlyObjectProperty;
import javafx.beans.property.ReadOnlyObjectWrapper;
import org.hazewright.batch.Batch;
import org.hazewright.batch.Replan;
import org.hazewright.bench.Grams;
import org.hazewright.bench.Outlook;
import org.hazewright.bench.Sensitivity;
import org.hazewright.bench.Step;
import org.hazewright.bench.Weighing;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Brief;
import org.hazewright.mixture.Recipe;
import org.hazewright.optics.Figures;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Shelf;

/**
 * A recipe being weighed, one step at a time: takes what the balance types, re-plans what is left, tells what the batch will give, and is
 * kept on disk after every step.
 */
public final class AtBalance {
    private static final int DRAWS = 4000;

    /** A mass this far from the wanted one is asked about before it is taken. */
    private static final double STRANGE = 0.2;

    /** How a step stands. */
    public enum State {
        DONE,
        NOW,
        LATER
    }

    /**
     * A step as it is shown.
     *
     * @param wantedG grams to weigh, re-planned; NaN for a step that weighs nothing
     * @param plannedG grams of the recipe
     * @param weighedG what was weighed; NaN before that
     */
    public record Line(Step step, State state, String name, double wantedG, double plannedG, double weighedG) {
        public boolean weighs() {
            return !Double.isNaN(plannedG);
        }
    }

    /** The weighing as a whole at one moment; {@code at} is the step's place, {@code lines.size()} when all are done. */
    public record Now(List<Line> lines, int at, Recipe recipe) {
        public boolean over() {
            return at >= lines.size();
        }

        public Line line() {
            return lines.get(at);
        }
    }

    /** The grams allowed at the step. */
    public record Band(double lowG, double highG) {}

    private final Batch opened;
    private final Optional<Brief> brief;
    private final Recipe plan;
    private final Optional<Replan> replan;
    private final List<Step> steps;
    private final List<Weighed> entries = new ArrayList<>();
    private final WeighingLog log;
    private final Work.Lane looking;
    private final Work.Lane keeping;

    private final ReadOnlyObjectWrapper<Now> now = new ReadOnlyObjectWrapper<>();
    private final ReadOnlyObjectWrapper<Outlook> outlook = new ReadOnlyObjectWrapper<>();
    private final ReadOnlyObjectWrapper<Optional<Band>> band = new ReadOnlyObjectWrapper<>(Optional.empty());
    private final ReadOnlyObjectWrapper<String> complaint = new ReadOnlyObjectWrapper<>("");
    private final ReadOnlyObjectWrapper<Optional<Double>> moreBase = new ReadOnlyObjectWrapper<>(Optional.empty());
    private String asked = "";

    /**
     * All that must be computed before the first step; made off the interface thread.
     *
     * @param replan empty when the batch does not know what is wanted
     * @param kept what was done before
     */
    public record Prepared(Batch batch, Optional<Replan> replan, List<Step> steps, List<Weighed> kept) {
        public static Prepared of(Batch batch, Shelf shelf, List<Weighed> kept) {
            List<Step> steps = WeighingSteps.of(batch);
            Optional<Replan> replan = batch.brief().map(b -> new Replan(b, batch.plan(), shelf));
            return new Prepared(batch, replan, steps, WeighingSteps.entries(batch, steps, kept));
        }
    }

    public AtBalance(Prepared p, WeighingLog log, Work work) {
        this.opened = p.batch();
        this.brief = p.batch().brief();
        this.plan = p.batch().plan();
        this.replan = p.replan();
        this.steps = p.steps();
        this.log = log;
        looking = work.lane(Work.Haste.INTERRUPT);
        keeping = work.lane(Work.Haste.FINISH);
        entries.addAll(p.kept());
        show();
    }

    public ReadOnlyObjectProperty<Now> nowProperty() {
        return now.getReadOnlyProperty();
    }

    /** What the batch will give, with what was weighed and the rest as re-planned; null at first. */
    public ReadOnlyObjectProperty<Outlook> outlookProperty() {
        return outlook.getReadOnlyProperty();
    }

    public ReadOnlyObjectProperty<Optional<Band>> bandProperty() {
        return band.getReadOnlyProperty();
    }

    /** What is wrong with what was typed, or asked about it; empty when nothing is. */
    public ReadOnlyObjectProperty<String> complaintProperty() {
        return complaint.getReadOnlyProperty();
    }

    /** Grams of a liquid base that would bring a batch that misses inside its tolerances. */
    public ReadOnlyObjectProperty<Optional<Double>> moreBaseProperty() {
        return moreBase.getReadOnlyProperty();
    }

    public Balance balance() {
        return opened.balance();
    }

    /** The batch with what is weighed so far. */
    public Batch batch() {
        Batch b = opened;
        List<Weighing> weighings = opened.weighings();
        for (int k = 0; k < steps.size(); k++) {
            Optional<Weighing> w = steps.get(k).weighing();
            if (w.isPresent() && entries.get(k).done())
                b = b.withWeighed(place(weighings, w.get()), entries.get(k).massG());
        }
        return b;
    }

    /** The recipe as it was planned. */
    public Recipe plan() {
        return plan;
    }

    /** Loads weighed so far of the present step. */
    public List<Double> loads() {
        return now.get().over() ? List.of() : entries.get(now.get().at()).loadsG();
    }

    /** Grams to weigh in the present load: the whole, or one of as few equal loads as the capacity allows. */
    public double loadWantedG() {
        Line line = now.get().line();
        double left = line.wantedG() - entries.get(now.get().at()).massG();
        int loads = balance().loads(line.wantedG()) - loads().size();
        return loads <= 1
                ? Math.max(0, balance().rounded(left))
                : Grams.loads(left, balance()).get(0);
    }

    /** How many loads the present step takes. */
    public int loadCount() {
        return Math.max(balance().loads(now.get().line().wantedG()), loads().size() + 1);
    }

    /** Takes what was typed at a step that weighs; at any other step ticks it off. True when the weighing went on. */
    public boolean enter(String text) {
        if (now.get().over()) return false;
        Line line = now.get().line();
        if (!line.weighs()) {
            if (!text.isBlank()) {
                complaint.set("Nothing is weighed at this step; press Enter when it is done.");
                return false;
            }
            advance(new Weighed(List.of(), true));
            return true;
        }
        try {
            double g = Typed.grams(text)
                    .orElseThrow(() -> new Refusal("Type the grams that the balance shows, or let it type them."));
            if (!(g >= 0)) throw new Refusal("The balance shows less than nothing; tare it and weigh again.");
            if (g > 2 * balance().capacityG())
                throw new Refusal(Figures.plain(g) + " g is more than this balance can carry ("
                        + Figures.plain(balance().capacityG()) + " g).");
            double wanted = loadWantedG();
            boolean strange = Math.abs(g - wanted)
                    > Math.max(STRANGE * wanted, 5 * balance().readabilityG());
            if (strange && !asked.equals(text.strip())) {
                asked = text.strip();
                complaint.set("That is far from " + Grams.shown(wanted, balance())
                        + ". If it is what the balance shows, press"
                        + " Enter once more and the rest is planned anew.");
                return false;
            }
            List<Double> loads = new ArrayList<>(loads());
            loads.add(g);
            boolean last = loads.size() >= balance().loads(line.wantedG());
            if (last) advance(new Weighed(loads, true));
            else {
                entries.set(now.get().at(), new Weighed(loads, false));
                changed();
            }
            return true;
        } catch (Refusal refusal) {
            complaint.set(refusal.getMessage());
            return false;
        }
    }

    /** Opens the last step again, or the last load of the present one. */
    public void back() {
        int at = now.get().at();
        if (at < entries.size() && !entries.get(at).loadsG().isEmpty()) {
            List<Double> loads = entries.get(at).loadsG();
            entries.set(at, new Weighed(loads.subList(0, loads.size() - 1), false));
        } else if (at > 0) {
            List<Double> loads = entries.get(at - 1).loadsG();
            entries.set(at - 1, new Weighed(loads.isEmpty() ? loads : loads.subList(0, loads.size() - 1), false));
        }
        changed();
    }

    private void advance(Weighed entry) {
        entries.set(now.get().at(), entry);
        changed();
    }

    private void changed() {
        asked = "";
        complaint.set("");
        show();
        List<Weighed> copy = List.copyOf(entries);
        Batch batch = batch();
        keeping.request(
                (stop, progress) -> {
                    log.keep(batch, copy);
                    return null;
                },
                kept -> {},
                failure -> complaint.set("This step could not be kept on disk. " + Papers.words(failure)));
    }

    private List<Replan.Done> done() {
        List<Replan.Done> done = new ArrayList<>();
        for (int k = 0; k < steps.size(); k++) {
            Optional<Weighing> w = steps.get(k).weighing();
            if (w.isPresent() && entries.get(k).done())
                done.add(new Replan.Done(
                        w.get().role(), w.get().place(), entries.get(k).massG()));
        }
        return done;
    }

    /** What is weighed, and the rest as it should be; what corrects a batch is weighed as it was planned. */
    private Recipe asItShouldBe() {
        boolean corrects = opened.correctionCount() > 0;
        return corrects || replan.isEmpty() ? batch().asMade() : replan.get().after(done());
    }

    private void show() {
        Recipe made = asItShouldBe();
        List<Weighing> planned = Weighing.of(plan);
        List<Weighing> wanted = Weighing.of(made);
        int at = 0;
        while (at < steps.size() && entries.get(at).done()) at++;
        List<Line> lines = new ArrayList<>();
        for (int k = 0; k < steps.size(); k++) {
            Step step = steps.get(k);
            State state = entries.get(k).done() ? State.DONE : k == at ? State.NOW : State.LATER;
            double wantedG = Double.NaN;
            double plannedG = Double.NaN;
            String name = step.text();
            if (step.weighing().isPresent()) {
                int n = place(planned, step.weighing().get());
                plannedG = planned.get(n).massG();
                wantedG = wanted.get(n).massG();
                name = name(step.weighing().get());
            }
            double weighedG = entries.get(k).done() && step.weighing().isPresent()
                    ? entries.get(k).massG()
                    : Double.NaN;
            lines.add(new Line(step, state, name, wantedG, plannedG, weighedG));
        }
        now.set(new Now(List.copyOf(lines), at, made));
        band.set(Optional.empty());
        look(made, at);
    }

    /** Where a weighing stands among all of a recipe. */
    static int place(List<Weighing> all, Weighing w) {
        for (int k = 0; k < all.size(); k++)
            if (all.get(k).role() == w.role() && all.get(k).place() == w.place()) return k;
        throw new IllegalStateException("The recipe has no such weighing.");
    }

    private String name(Weighing w) {
        if (w.role() == Weighing.Role.ITEM) return Words.item(plan.items().get(w.place()));
        String bottle =
                w.from().isPresent() ? Words.stock(plan, plan.stock(w.from().get())) : Words.shortName(w.ingredient());
        return bottle + " for the stock " + Words.ratio(plan.stocks().get(w.place()));
    }

    private record Looked(Outlook outlook, Optional<Band> band, Optional<Double> moreBase) {}

    private void look(Recipe made, int at) {
        if (brief.isEmpty()) return;
        Brief wanted = brief.get();
        Replan with = replan.get();
        boolean weighs = at < steps.size() && steps.get(at).weighing().isPresent();
        Weighing w = weighs ? steps.get(at).weighing().get() : null;
        looking.request(
                (stop, progress) -> {
                    Outlook o = Outlook.near(wanted, made, with.sweep(), DRAWS);
                    Optional<Band> allowed = w == null
                            ? Optional.empty()
                            : Sensitivity.of(made, wanted.balance(), wanted.points()).stream()
                                    .filter(s -> s.weighing().role() == w.role()
                                            && s.weighing().place() == w.place())
                                    .findFirst()
                                    .map(s -> new Band(s.lowG(), s.highG()));
                    return new Looked(o, allowed, with.moreBaseG(made));
                },
                looked -> {
                    outlook.set(looked.outlook());
                    band.set(looked.band());
                    moreBase.set(looked.moreBase());
                },
                failure -> complaint.set(Papers.words(failure)));
    }

    /** Why a later step asks for other grams than the recipe: "planned 1.812 g; what was weighed before asks for 1.815 g". */
    public String why(Line line) {
        if (!line.weighs() || line.state() == State.DONE || line.wantedG() == line.plannedG()) return "";
        return Words.grams(line.plannedG(), balance()) + " → " + Words.grams(line.wantedG(), balance())
                + " g, after what was weighed";
    }

    /** The batch as it was weighed, every step done or as re-planned. */
    public Recipe made() {
        return now.get().recipe();
    }

    public WeighingLog log() {
        return log;
    }
}
