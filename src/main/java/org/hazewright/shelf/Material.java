package org.hazewright.shelf;

import org.hazewright.optics.RefractiveIndex;

/** A substance with a refractive index, named by files of ingredients: what particles and hosts are made of. */
public record Material(String id, String name, RefractiveIndex index, Source source) {}
