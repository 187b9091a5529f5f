package org.hazewright.optics;

/** Numbers in messages: whole numbers without a decimal point, others as they are. */
final class Plain {
    private Plain() {}

    static String number(double value) {
        return value == Math.rint(value) && Math.abs(value) < 1e15
                ? Long.toString((long) value)
                : Double.toString(value);
    }
}
