package org.hazewright.files;

import java.util.function.Supplier;

/** What reading a file came to: a value, or the refusal that stands in its place until someone asks for the value. */
record Attempt<T>(T value, FileRefusal refusal) {

    static <T> Attempt<T> of(Supplier<T> reading) {
        try {
            return new Attempt<>(reading.get(), null);
        } catch (FileRefusal refused) {
            return new Attempt<>(null, refused);
        }
    }

    T get() {
        if (refusal != null) throw refusal;
        return value;
    }
}
