package org.hazewright.bench;

import java.util.List;

/** What stands on everything that this program hands to a person at a bench. */
public final class Cautions {
    private Cautions() {}

    /** Holds for every recipe: sheets, window and README have these words from here. */
    public static final List<String> GENERAL = List.of(
            "Safety data sheets and the rules of your workplace come before anything written here.",
            "This is not a medical device. A phantom checks an instrument; what it means for patients is decided by the person who is"
                    + " responsible for the clinical calibration.",
            "A phantom may not be swallowed, injected or put on a patient. Label it so, and keep it away from food and medicines.",
            "Measure the finished phantom before relying on it: a prediction is as good as the figures of its ingredients.",
            "When a laser is used to measure it, the rules for laser safety at your workplace hold.");

    static final String POWDER =
            "do not breathe the dust: weigh and wet it under extraction or with a fitted mask, as its safety data"
                    + " sheet and local rules say.";

    static final String HARDENER =
            "resins and hardeners irritate and sensitise, and curing gives off heat: gloves, eye protection and"
                    + " fresh air, as both safety data sheets and local rules say.";

    static final String ISOCYANATE =
            "isocyanates can make the airways sensitive for life: only with training and extraction, by the"
                    + " safety data sheet and local rules; keep water away, it foams and builds pressure in a closed bottle.";

    static final String AZIDE =
            "very toxic, and explosive with acid or in copper and lead drains: only trained people, under a hood, by"
                    + " the safety data sheet and local rules. Write the azide on the phantom's label and collect all waste.";

    static final String BLOOD =
            "treat blood and what is made from it as infectious unless its supplier states otherwise: only under"
                    + " your local rules for biological work, in isotonic buffer, waste collected.";

    static final String HOT = "hot liquid: gloves and eye protection; heat gently with a loose lid, it can boil over.";

    static final String ULTRASOUND =
            "ultrasound is loud and warms the cup: ear protection, and pauses when it grows warm.";
}
