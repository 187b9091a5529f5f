package org.hazewright.files;

import java.util.Collection;
import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;
import org.hazewright.optics.ConstantIndex;
import org.hazewright.optics.IapwsWater;
import org.hazewright.shelf.Family;
import org.hazewright.shelf.Material;
import org.hazewright.shelf.Nearest;
import org.hazewright.shelf.Source;

/** The materials of a shelf while its ingredients are read, the ones whose files are broken included by name. */
final class Materials {
    private final Map<String, Material> good = new TreeMap<>();
    private final Map<String, FileRefusal> broken = new TreeMap<>();

    void add(Material material) {
        good.put(material.id(), material);
    }

    void addBroken(String id, FileRefusal refusal) {
        broken.put(id, refusal);
    }

    Collection<Material> all() {
        return good.values();
    }

    Optional<Material> find(String id) {
        return Optional.ofNullable(good.get(id));
    }

    Material require(String id, Place from) {
        Material found = good.get(id);
        if (found != null) return found;
        if (broken.containsKey(id))
            throw new FileRefusal(
                    from.path(),
                    from.line(),
                    from.column(),
                    "The file of the material \"" + id
                            + "\" is refused, so it cannot be used here. Mend that file first.",
                    broken.get(id));
        throw from.refusal("There is no material \"" + id + "\"; a file materials/" + id + ".toml is needed."
                + Nearest.to(id, good.keySet())
                        .map(n -> " Perhaps \"" + n + "\" is meant.")
                        .orElse(good.isEmpty() ? "" : " There are: " + String.join(", ", good.keySet()) + "."));
    }

    /**
     * The index taken for a base whose file names none: water by IAPWS R9-97 for liquids and gels, 1.41 for silicone, 1.54 for
     * resin (common practice), all over 380–1300 nm but water's.
     */
    Material assumed(Family family) {
        return switch (family) {
            case LIQUID, GEL ->
                find("water")
                        .orElseGet(() -> new Material(
                                "water",
                                "Water",
                                new IapwsWater(),
                                new Source(
                                        Source.Basis.PUBLISHED,
                                        "IAPWS R9-97 (1997); taken for a watery base without an index.")));
            case SILICONE -> constant("silicone-assumed", "Silicone, assumed", 1.41);
            case RESIN -> constant("resin-assumed", "Resin, assumed", 1.54);
        };
    }

    private static Material constant(String id, String name, double n) {
        return new Material(
                id,
                name,
                new ConstantIndex(name, n, 0, 380, 1300),
                new Source(
                        Source.Basis.MEMORY,
                        "n = " + n + ", assumed for a base whose file names no index (common practice)."));
    }
}
