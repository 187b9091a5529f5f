package org.hazewright.desk.model;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.TreeSet;
import org.hazewright.bench.Answer;
import org.hazewright.bench.Outlook;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Recipe;

/**
 * The recipe on the desk and what it gives.
 *
 * @param answer the search behind it; while following, that of the brief before it began to move
 * @param blood what it comes to as blood, for a tissue-like brief; while following, that of the brief before
 * @param following whether the amounts follow a brief that is being changed, with the search yet to come
 */
public record Shown(Outlook outlook, Answer answer, Optional<AsBlood> blood, boolean following) {

    /** Another way that may be chosen. */
    public record Card(
            String title, List<String> what, int weighings, double chance, Outlook outlook, List<String> key) {
        public Card {
            what = List.copyOf(what);
            key = List.copyOf(key);
        }

        /** The miss furthest out, signed, in half-widths. */
        public double worstMiss() {
            double worst = 0;
            for (Answer.Predicted p : outlook.predicted()) if (Math.abs(p.miss()) > Math.abs(worst)) worst = p.miss();
            return worst;
        }
    }

    public Recipe recipe() {
        return outlook.recipe();
    }

    /** What tells one way from another: its base, then the ids of what goes into it. */
    public static List<String> key(Recipe recipe) {
        TreeSet<String> ids = new TreeSet<>();
        for (Item i : recipe.items()) ids.add(i.ingredient().id());
        List<String> key = new ArrayList<>();
        key.add(recipe.base().id());
        key.addAll(ids);
        return key;
    }
}
