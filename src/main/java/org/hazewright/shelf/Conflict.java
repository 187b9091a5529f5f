package org.hazewright.shelf;

/**
 * Two ingredients that should not meet: a warning on the sheet, or, with {@code refuse}, a pair that the search never joins.
 */
public record Conflict(String with, String why, boolean refuse) {}
