package org.hazewright.brief;

import java.util.HashSet;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import org.hazewright.optics.Refusal;

/**
 * A set of phantoms wanted together: briefs that share base, batch, balance and limits of the search and differ in their targets.
 *
 * @param name of the file, without its ending
 * @param phantoms at least one, in the order of making; each brief's name is the series' name, a hyphen and the phantom's own
 * @param titration when they are made one after the other in one vessel, how
 */
public record Series(String name, String title, List<Brief> phantoms, Optional<Titration> titration) {

    public Series {
        phantoms = List.copyOf(phantoms);
        if (phantoms.isEmpty())
            throw new Refusal("The series \"" + title
                    + "\" has no phantoms; give [[phantom]] entries, or a [series] with mua_per_cm and musp_per_cm.");
        Set<String> names = new HashSet<>();
        Brief first = phantoms.get(0);
        for (Brief b : phantoms) {
            if (!names.add(b.name())) throw new Refusal("Two phantoms of the series are called " + b.name() + ".");
            if (!b.bases().equals(first.bases())
                    || b.volumeMl() != first.volumeMl()
                    || b.temperatureC() != first.temperatureC()
                    || !b.limits().equals(first.limits())
                    || !b.balance().equals(first.balance()))
                throw new Refusal(
                        "The phantoms " + first.name() + " and " + b.name()
                                + " do not share base, batch, temperature, balance and limits; that makes them two briefs and not a series.");
        }
    }

    /** The phantom's own name: {@code A1} of {@code block-A1} in the series {@code block}. */
    public String ownName(Brief phantom) {
        return phantom.name().startsWith(name + "-") ? phantom.name().substring(name.length() + 1) : phantom.name();
    }
}
