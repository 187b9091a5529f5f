package org.hazewright.files;

import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import org.hazewright.brief.Mould;
import org.hazewright.mixture.Recipe;

/** The moulds that a brief of any kind asks for, which may be none, with the SHA-256 of the brief. */
public record Casting(Path brief, List<Mould> moulds, String sha256) {

    public Casting {
        moulds = List.copyOf(moulds);
    }

    public static Casting read(Path brief) {
        TextFile text = TextFile.read(brief);
        TomlPage page = TomlPage.of(text);
        page.requireFormat(FileKind.BRIEF);
        return new Casting(brief, BriefReader.moulds(page), text.sha256());
    }

    /** Whether a recipe answers this brief, byte for byte. */
    public boolean isOf(Recipe recipe) {
        return recipe.briefSha256().filter(sha256::equals).isPresent();
    }

    /** Of the brief beside a recipe or batch file, called as it is, when the recipe answers it. */
    public static Optional<Casting> beside(Path recipeFile, Recipe recipe) {
        String name = recipeFile.getFileName().toString();
        for (String ending : new String[] {".recipe.toml", ".batch.toml"}) {
            if (!name.toLowerCase(Locale.ROOT).endsWith(ending)) continue;
            Path brief = recipeFile.resolveSibling(name.substring(0, name.length() - ending.length()) + ".brief.toml");
            if (!Files.isRegularFile(brief)) return Optional.empty();
            try {
                return Optional.of(read(brief)).filter(c -> c.isOf(recipe));
            } catch (FileRefusal notThisRecipes) {
                return Optional.empty(); // it has been changed since, so it is another brief
            }
        }
        return Optional.empty();
    }
}
