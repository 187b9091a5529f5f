/**
 * TOML and CSV files to the values of the domain and back, with messages that name file, line and column.
 *
 * <p>The only place that knows how a file is written: keys, columns, limits and where a path may lead. It computes nothing. What
 * a person can get wrong is refused once, by {@link org.hazewright.files.FileRefusal}; what cannot be written, by {@link
 * org.hazewright.files.WriteFailure}. Start with {@link org.hazewright.files.ShelfReader}, {@link
 * org.hazewright.files.BriefReader} and {@link org.hazewright.files.RecipeReader}; all stand on {@link
 * org.hazewright.files.TomlPage} and {@link org.hazewright.files.CsvTable}.
 */
package org.hazewright.files;
