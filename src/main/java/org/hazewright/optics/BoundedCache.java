package org.hazewright.optics;

import java.util.Iterator;
import java.util.LinkedHashMap;
import java.util.Map;
import java.util.function.ToLongFunction;

/**
 * A map that forgets what was used longest ago when the numbers it keeps add up to more than a limit, or to more than the
 * program's memory has room for. Safe for threads.
 */
final class BoundedCache<K, V> {
    /** A number takes 8 bytes, and no cache more than a sixteenth of the memory that the program may have. */
    private static final long SHARE_OF_MEMORY = 8 * 16;

    private final Map<K, V> known = new LinkedHashMap<>(64, 0.75f, true);
    private final long limit;
    private final ToLongFunction<V> size;
    private long kept;

    BoundedCache(long limit, ToLongFunction<V> size) {
        this.limit = Math.min(limit, Runtime.getRuntime().maxMemory() / SHARE_OF_MEMORY);
        this.size = size;
    }

    synchronized V get(K key) {
        return known.get(key);
    }

    synchronized void put(K key, V value) {
        V before = known.put(key, value);
        kept += size.applyAsLong(value) - (before == null ? 0 : size.applyAsLong(before));
        for (Iterator<V> oldest = known.values().iterator(); kept > limit && known.size() > 1; ) {
            kept -= size.applyAsLong(oldest.next());
            oldest.remove();
        }
    }

    synchronized int entries() {
        return known.size();
    }
}
