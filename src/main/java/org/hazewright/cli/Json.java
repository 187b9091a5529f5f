package org.hazewright.cli;

import com.fasterxml.jackson.jr.ob.JSON;
import java.io.IOException;
import java.io.PrintWriter;
import java.io.UncheckedIOException;
import java.util.LinkedHashMap;
import java.util.Map;

/** One JSON document on standard output: keys in the order given, numbers with all their digits, what is not known as null. */
final class Json {
    private final Map<String, Object> fields = new LinkedHashMap<>();

    static Json object() {
        return new Json();
    }

    /** Adds a field; a number that is not finite becomes null, since JSON has no word for it. */
    Json with(String key, Object value) {
        fields.put(key, value instanceof Json j ? j.fields : plain(value));
        return this;
    }

    /** Adds all fields of another. */
    Json withAll(Json other) {
        fields.putAll(other.fields);
        return this;
    }

    Map<String, Object> fields() {
        return fields;
    }

    private static Object plain(Object value) {
        return value instanceof Double d && !Double.isFinite(d) ? null : value;
    }

    void print(PrintWriter out) {
        try {
            out.println(JSON.std
                    .with(JSON.Feature.PRETTY_PRINT_OUTPUT)
                    .with(JSON.Feature.WRITE_NULL_PROPERTIES)
                    .asString(fields));
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }
}
