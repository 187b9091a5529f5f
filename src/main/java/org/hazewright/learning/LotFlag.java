package org.hazewright.learning;

import java.time.LocalDate;
import java.util.ArrayList;
import java.util.List;
import org.hazewright.shelf.Ingredient;

/** Why a lot should not be used without a second thought, in a plain sentence. */
public record LotFlag(Kind kind, String sentence) {

    /** What is wrong with a lot. */
    public enum Kind {
        EXPIRED,
        DRIFTING
    }

    /** Flags of a lot on a day; {@code drifts} may hold those of other lots too. An ingredient that is no lot has no date. */
    public static List<LotFlag> of(Ingredient ingredient, LocalDate day, List<Drift> drifts) {
        List<LotFlag> flags = new ArrayList<>();
        ingredient
                .lot()
                .filter(l -> l.expiredOn(day))
                .ifPresent(l -> flags.add(new LotFlag(
                        Kind.EXPIRED,
                        ingredient.id() + " (lot " + l.number() + ") is past its date of "
                                + l.expires().orElseThrow() + ".")));
        for (Drift d : drifts)
            if (d.drifting()
                    && d.factor().kind() == Factor.Kind.INGREDIENT
                    && d.factor().name().equals(ingredient.id())) flags.add(new LotFlag(Kind.DRIFTING, d.sentence()));
        return flags;
    }
}
