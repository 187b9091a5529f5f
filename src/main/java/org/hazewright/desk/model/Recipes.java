package org.hazewright.desk.model;

import java.util.Optional;
import org.hazewright.mixture.Recipe;

/** Small changes of a recipe that are no edits of its grams. */
final class Recipes {
    private Recipes() {}

    /** The recipe as the answer to a brief's file. */
    static Recipe answering(Recipe r, Optional<String> briefSha256) {
        return new Recipe(
                r.title(), r.base(), r.temperatureC(), r.weighingUncertaintyG(), briefSha256, r.stocks(), r.items());
    }
}
