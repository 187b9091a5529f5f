package org.hazewright.desk.model;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.function.Supplier;
import javafx.beans.property.ReadOnlyBooleanProperty;
import javafx.beans.property.ReadOnlyDoubleProperty;
import javafx.beans.property.ReadOnlyObjectProperty;
import javafx.beans.property.ReadOnlyObjectWrapper;
import org.hazewright.bench.Answer;
import org.hazewright.bench.Answering;
import org.hazewright.bench.Following;
import org.hazewright.bench.Outlook;
import org.hazewright.brief.Brief;
import org.hazewright.brief.SearchLimits;
import org.hazewright.brief.Tissue;
import org.hazewright.mixture.Recipe;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Shelf;

/**
 * From a brief that moves to a recipe on the desk.
 *
 * <p>At every edit the amounts follow at once where they can ({@link Following}); when the hand rests for a moment the search runs, then
 * the other ways are looked for. The newest brief wins; what is shown belongs to one brief as a whole.
 */
public final class Solving {
    /** How long a brief that is followed must rest before the search begins, ms. */
    private static final long REST_MS = 120;

    private static final int WAYS = 3;
    private static final int DRAWS_WHILE_FOLLOWING = 1000;

    private final Work.Lane following;
    private final Work.Lane search;
    private final Work.Lane ways;
    private final Work.Lane curving;

    private final ReadOnlyObjectWrapper<Shown> shown = new ReadOnlyObjectWrapper<>();
    private final ReadOnlyObjectWrapper<Curves> curves = new ReadOnlyObjectWrapper<>();
    private final ReadOnlyObjectWrapper<List<Shown.Card>> cards = new ReadOnlyObjectWrapper<>(List.of());
    private final ReadOnlyObjectWrapper<Optional<String>> problem = new ReadOnlyObjectWrapper<>(Optional.empty());
    private final ReadOnlyObjectWrapper<Optional<Throwable>> fault = new ReadOnlyObjectWrapper<>(Optional.empty());

    private final Supplier<Tissue.Spectra> spectra;
    private Following follower;

    /** {@code spectra} says how tissue and blood absorb; asked on any thread. */
    public Solving(Work work, Supplier<Tissue.Spectra> spectra) {
        this.spectra = spectra;
        following = work.lane(Work.Haste.FINISH);
        search = work.lane(Work.Haste.INTERRUPT);
        ways = work.lane(Work.Haste.INTERRUPT);
        curving = work.lane(Work.Haste.INTERRUPT);
    }

    /** The recipe on the desk; null before the first. */
    public ReadOnlyObjectProperty<Shown> shownProperty() {
        return shown.getReadOnlyProperty();
    }

    /** The prediction over wavelength of what is shown; null before the first. */
    public ReadOnlyObjectProperty<Curves> curvesProperty() {
        return curves.getReadOnlyProperty();
    }

    public ReadOnlyObjectProperty<List<Shown.Card>> cardsProperty() {
        return cards.getReadOnlyProperty();
    }

    /** Why the brief as it stands has no recipe, in words. */
    public ReadOnlyObjectProperty<Optional<String>> problemProperty() {
        return problem.getReadOnlyProperty();
    }

    /** A fault of the program, if one happened. */
    public ReadOnlyObjectProperty<Optional<Throwable>> faultProperty() {
        return fault.getReadOnlyProperty();
    }

    public ReadOnlyBooleanProperty searchingProperty() {
        return search.busyProperty();
    }

    public ReadOnlyDoubleProperty progressProperty() {
        return search.progressProperty();
    }

    public ReadOnlyBooleanProperty lookingForWaysProperty() {
        return ways.busyProperty();
    }

    /** Stops the search; what is shown stays. */
    public void stop() {
        search.stop();
        ways.stop();
    }

    /** Forgets what is shown. */
    public void clear() {
        stop();
        following.stop();
        curving.stop();
        follower = null;
        shown.set(null);
        curves.set(null);
        cards.set(List.of());
        problem.set(Optional.empty());
    }

    private record Solved(Shown shown, Following follower) {}

    private record Followed(Outlook outlook, Optional<Curves> curves) {}

    /** Asks for the recipe of a brief; {@code chosen} is the key of the way to keep to. */
    public void solve(Brief brief, Shelf shelf, Optional<List<String>> chosen) {
        boolean follows = follower != null && keepsTo(chosen) && follower.suits(brief);
        if (follows) follow(brief);
        else following.stop();
        ways.stop();
        search.requestAfter(
                follows ? REST_MS : 0,
                (stop, progress) -> {
                    Brief asked = chosen.map(key -> keeping(brief, key)).orElse(brief);
                    Answer a = Answering.to(asked, shelf, 0, stop, progress);
                    Outlook outlook = new Outlook(brief, a.recipe(), a.predicted(), a.budget(), a.chance());
                    if (stop.getAsBoolean()) return null;
                    Shown found = new Shown(outlook, a, AsBlood.of(a, spectra), false);
                    return new Solved(found, new Following(brief, a.recipe(), shelf));
                },
                solved -> {
                    following.stop();
                    follower = solved.follower();
                    problem.set(Optional.empty());
                    shown.set(solved.shown());
                    curve(solved.shown().outlook());
                    lookForWays(brief, shelf);
                },
                this::failed);
    }

    private boolean keepsTo(Optional<List<String>> chosen) {
        return shown.get() != null
                && chosen.map(key -> key.equals(Shown.key(shown.get().recipe())))
                        .orElse(true);
    }

    private void follow(Brief brief) {
        Following with = follower;
        Curves known = curves.get();
        following.request(
                (stop, progress) -> {
                    Outlook o = with.to(brief, DRAWS_WHILE_FOLLOWING);
                    Optional<Curves> near = known != null && known.covers(o.recipe())
                            ? Optional.of(known.near(o.recipe()))
                            : Optional.empty();
                    return new Followed(o, near);
                },
                followed -> {
                    if (with != follower) return;
                    curving.stop();
                    followed.curves().ifPresent(curves::set);
                    problem.set(Optional.empty());
                    Shown last = shown.get();
                    shown.set(new Shown(followed.outlook(), last.answer(), last.blood(), true));
                },
                failure -> {
                    if (!(failure instanceof Refusal)) fault.set(Optional.of(failure));
                });
    }

    private void curve(Outlook outlook) {
        curving.request(
                (stop, progress) -> Curves.of(
                        outlook.recipe(),
                        outlook.brief().balance().capacityG(),
                        outlook.brief().wavelengthsNm()),
                curves::set,
                this::failed);
    }

    private void lookForWays(Brief brief, Shelf shelf) {
        List<String> now = Shown.key(shown.get().recipe());
        ways.request(
                (stop, progress) -> {
                    Answer a = Answering.to(brief, shelf, WAYS, stop, progress);
                    List<Shown.Card> found = new ArrayList<>();
                    if (!Shown.key(a.recipe()).equals(now)) {
                        Outlook best = new Outlook(brief, a.recipe(), a.predicted(), a.budget(), a.chance());
                        found.add(card("the best found", best, weighings(a.recipe(), brief), a.chance(), a.recipe()));
                    }
                    for (Answer.Alternative way : a.alternatives()) {
                        if (stop.getAsBoolean()) return found;
                        if (Shown.key(way.recipe()).equals(now)) continue;
                        Outlook o = Outlook.of(brief, way.recipe(), 0);
                        found.add(card(way.why(), o, way.weighings(), way.chance(), way.recipe()));
                    }
                    return found;
                },
                cards::set,
                this::failed);
    }

    private static Shown.Card card(String title, Outlook o, int weighings, double chance, Recipe recipe) {
        return new Shown.Card(
                title, recipe.items().stream().map(Words::item).toList(), weighings, chance, o, Shown.key(recipe));
    }

    private static int weighings(Recipe recipe, Brief brief) {
        int count = 0;
        for (var s : recipe.stocks())
            count += brief.balance().loads(s.ingredientG()) + brief.balance().loads(s.diluentG());
        for (var i : recipe.items()) count += brief.balance().loads(i.massG());
        return count;
    }

    /** The brief with its search held to one way. */
    private static Brief keeping(Brief b, List<String> key) {
        SearchLimits only = new SearchLimits(
                key.subList(1, key.size()), List.of(), 8, 8, 8, b.limits().leastBaseShare());
        return new Brief(
                b.name(),
                b.title(),
                List.of(key.get(0)),
                b.batchMl(),
                b.overage(),
                b.temperatureC(),
                b.targets(),
                b.moulds(),
                only,
                b.balance(),
                b.stocksInHand(),
                b.tissue(),
                b.sha256());
    }

    private void failed(Throwable failure) {
        if (failure instanceof Refusal) problem.set(Optional.of(failure.getMessage()));
        else fault.set(Optional.of(failure));
    }
}
