package org.hazewright.sheet;

/**
 * The colours of the workbook as RGB hex: milk white, ink blue-black, amber for what is wanted, teal for what is predicted, brick
 * for a miss. None carries meaning alone: a word or a sign stands beside it.
 */
final class Palette {
    static final String INK = "1E2A3A";
    static final String QUIET = "5A6777";
    static final String RULE = "DDD6C7";
    static final String TRACK = "B3AA95";
    static final String MILK = "FFFDF8";

    /** For lines and brackets. */
    static final String AMBER = "C9820A";

    /** For letters: darker, so that small type keeps a contrast above 4.5 on white. */
    static final String AMBER_TYPE = "8A5700";

    static final String TEAL = "0E7C7B";
    static final String BRICK = "A63D28";

    /** Grounds of cells. */
    static final String TEAL_GROUND = "DDEFEC";

    static final String BRICK_GROUND = "F8E1DB";

    private Palette() {}

    /** Red, green and blue of a hex colour, as POI wants them. */
    static byte[] rgb(String hex) {
        int value = Integer.parseInt(hex, 16);
        return new byte[] {(byte) (value >> 16), (byte) (value >> 8), (byte) value};
    }
}
