package org.hazewright.files;

/** A result that could not be written, in one plain message: where, why, and what to do. Nothing is left half-written. */
public final class WriteFailure extends RuntimeException {
    public WriteFailure(String message) {
        super(message);
    }

    public WriteFailure(String message, Throwable cause) {
        super(message, cause);
    }
}
