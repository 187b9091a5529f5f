/** The recipe on paper: laid out once, drawn into a PDF file or sent to a printer. Start with {@link org.hazewright.desk.paper.RecipePaper}. */
package org.hazewright.desk.paper;
