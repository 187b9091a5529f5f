/** Looking through the shelf: finding, comparing, checking, adding. Start with {@link org.hazewright.desk.shelf.ShelfView}. */
package org.hazewright.desk.shelf;
