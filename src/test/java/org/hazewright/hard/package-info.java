/**
 * What tries to break the program: fuzzing of every reader, kills at random instants, full disks, hostile files, other countries.
 *
 * <p>{@link org.hazewright.hard.Door} lists the ways in, with the seeds of each; {@link org.hazewright.hard.Promise} says what none of
 * them may ever do. {@code Fuzz}, {@code Killing} and {@code FullDisk} are commands that run for as long as they are told; the tests
 * beside them are their short form, and every case that was ever found. No code of the program lives here.
 */
package org.hazewright.hard;
