package org.hazewright.desk.paper;

import org.hazewright.desk.pen.Pen;

/** Pages of A4, 595 by 842 points, given out one after the other. */
public interface Paper {
    double WIDTH = 595;
    double HEIGHT = 842;

    /** A pen for the next page. */
    Pen nextPage();
}
