package org.hazewright.hard;

import java.lang.reflect.Field;
import java.lang.reflect.Modifier;
import java.util.Map;
import org.junit.jupiter.api.extension.BeforeEachCallback;
import org.junit.jupiter.api.extension.ExtensionContext;

/**
 * Empties what the optics remember between tests, for {@link Mutation}: many faults are tried in one Java machine, and a figure worked out
 * before the fault was there would hide it. Only in use where extensions are looked for, which the usual tests do not.
 */
public final class Forgetful implements BeforeEachCallback {
    @Override
    public void beforeEach(ExtensionContext context) throws ReflectiveOperationException {
        for (String name : new String[] {"Population", "GaussLegendre"}) {
            Class<?> holder = Class.forName("org.hazewright.optics." + name);
            for (Field field : holder.getDeclaredFields()) {
                if (!Modifier.isStatic(field.getModifiers())) continue;
                field.setAccessible(true);
                if (field.get(null) instanceof Map<?, ?> map) map.clear();
                else if (field.getType().getSimpleName().equals("BoundedCache")) empty(field.get(null));
            }
        }
    }

    private static void empty(Object cache) throws ReflectiveOperationException {
        for (Field field : cache.getClass().getDeclaredFields()) {
            field.setAccessible(true);
            if (field.get(cache) instanceof Map<?, ?> known) {
                synchronized (cache) {
                    known.clear();
                }
            } else if (field.getName().equals("kept")) field.setLong(cache, 0);
        }
    }
}
