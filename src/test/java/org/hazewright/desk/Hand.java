package org.hazewright.desk;

import javafx.geometry.Bounds;
import javafx.geometry.Point2D;
import javafx.scene.Node;
import javafx.scene.input.KeyCode;
import javafx.scene.input.MouseButton;
import javafx.scene.robot.Robot;

/** Types and points like a person, through the toolkit's robot. */
final class Hand {
    private final Robot robot = Stagehand.onUi(Robot::new);

    void press(KeyCode... together) {
        Stagehand.ui(() -> {
            for (KeyCode k : together) robot.keyPress(k);
            for (int k = together.length - 1; k >= 0; k--) robot.keyRelease(together[k]);
        });
        Stagehand.pulse();
    }

    /** Letters, digits and the signs that numbers are made of. */
    void type(String text) {
        for (char c : text.toCharArray()) {
            KeyCode key = switch (c) {
                case '.' -> KeyCode.PERIOD;
                case ',' -> KeyCode.COMMA;
                case ' ' -> KeyCode.SPACE;
                case '-' -> KeyCode.MINUS;
                default -> KeyCode.getKeyCode(String.valueOf(Character.toUpperCase(c)));
            };
            Stagehand.ui(() -> robot.keyType(key));
        }
        Stagehand.pulse();
    }

    /** Types over what stands in the focused field. */
    void typeOver(String text) {
        press(KeyCode.CONTROL, KeyCode.A);
        type(text);
    }

    /** Drags from a point of a node to another, in steps. */
    void drag(Node in, double x0, double y0, double x1, double y1) {
        Point2D from = Stagehand.onUi(() -> in.localToScreen(x0, y0));
        Point2D to = Stagehand.onUi(() -> in.localToScreen(x1, y1));
        Stagehand.ui(() -> robot.mouseMove(from));
        Stagehand.pulse();
        Stagehand.ui(() -> robot.mousePress(MouseButton.PRIMARY));
        int steps = 8;
        for (int k = 1; k <= steps; k++) {
            Point2D at = from.interpolate(to, (double) k / steps);
            Stagehand.ui(() -> robot.mouseMove(at));
            Stagehand.pulse();
        }
        Stagehand.ui(() -> robot.mouseRelease(MouseButton.PRIMARY));
        Stagehand.pulse();
    }

    /** Takes hold of a point of a node. */
    void grab(Node in, double x, double y) {
        Point2D at = Stagehand.onUi(() -> in.localToScreen(x, y));
        Stagehand.ui(() -> robot.mouseMove(at));
        Stagehand.pulse();
        Stagehand.ui(() -> robot.mousePress(MouseButton.PRIMARY));
        Stagehand.pulse();
    }

    /** Moves by so many px on the screen, in two steps. */
    void moveBy(double dx, double dy) {
        for (int k = 0; k < 2; k++) {
            Stagehand.ui(() -> robot.mouseMove(robot.getMouseX() + dx / 2, robot.getMouseY() + dy / 2));
            Stagehand.pulse();
        }
    }

    void letGo() {
        Stagehand.ui(() -> robot.mouseRelease(MouseButton.PRIMARY));
        Stagehand.pulse();
    }

    void click(Node node) {
        Bounds b = Stagehand.onUi(() -> node.localToScreen(node.getBoundsInLocal()));
        Stagehand.ui(() -> {
            robot.mouseMove(b.getCenterX(), b.getCenterY());
            robot.mousePress(MouseButton.PRIMARY);
            robot.mouseRelease(MouseButton.PRIMARY);
        });
        Stagehand.pulse();
    }
}
