package org.hazewright.picture;

/**
 * The colours of workbooks and pictures as RGB hex: milk white, ink blue-black, amber for what is wanted, teal for what is predicted, brick
 * for a miss. None carries meaning alone: a word or a sign stands beside it.
 */
public final class Palette {
    public static final String INK = "1E2A3A";
    public static final String QUIET = "5A6777";
    public static final String RULE = "DDD6C7";
    public static final String TRACK = "B3AA95";
    public static final String MILK = "FFFDF8";

    /** For lines and brackets. */
    public static final String AMBER = "C9820A";

    /** For letters: darker, so that small type keeps a contrast above 4.5 on white. */
    public static final String AMBER_TYPE = "8A5700";

    public static final String TEAL = "0E7C7B";
    public static final String BRICK = "A63D28";

    /** Grounds of cells. */
    public static final String TEAL_GROUND = "DDEFEC";

    public static final String BRICK_GROUND = "F8E1DB";

    private static final String[] BY_WAVELENGTH = {TEAL, AMBER, INK, "7A5C99", "6B8E23"};

    private Palette() {}

    /** Wavelengths are told apart by colour, and by the number written beside them; from 0. */
    public static String ofWavelength(int number) {
        return BY_WAVELENGTH[number % BY_WAVELENGTH.length];
    }

    /** Red, green and blue of a hex colour, as POI wants them. */
    public static byte[] rgb(String hex) {
        int value = Integer.parseInt(hex, 16);
        return new byte[] {(byte) (value >> 16), (byte) (value >> 8), (byte) value};
    }
}
