import { expect, it } from "vitest";
import { EXAMPLES } from "../../../renderer/examples/all-examples";
import { pictureOf, withPicture } from "../../../renderer/panels/recent-pictures";

const setup = EXAMPLES[0].setup;

it("the picture of a recent file shows the tray as it was opened", () => {
  const preferences = withPicture({}, "one", setup);
  expect(pictureOf(preferences, "one")?.parts.map(({ id }) => id)).toEqual(setup.parts.map(({ id }) => id));
  expect(pictureOf(preferences, "two")).toBeNull();
});

it("other preferences stay, and pictures beyond a dozen go, the oldest first", () => {
  let preferences = withPicture({ grid: true }, "file 0", setup);
  for (let number = 1; number <= 20; number++) preferences = withPicture(preferences, `file ${number}`, setup);
  expect(preferences.grid).toBe(true);
  expect(pictureOf(preferences, "file 20")).not.toBeNull();
  expect(pictureOf(preferences, "file 9")).not.toBeNull();
  expect(pictureOf(preferences, "file 8")).toBeNull();
});

it("a file that is opened again is the newest again", () => {
  let preferences = withPicture({}, "first", setup);
  for (let number = 1; number <= 11; number++) preferences = withPicture(preferences, `file ${number}`, setup);
  preferences = withPicture(preferences, "first", setup);
  for (let number = 12; number <= 20; number++) preferences = withPicture(preferences, `file ${number}`, setup);
  expect(pictureOf(preferences, "first")).not.toBeNull();
});

it("what is kept cannot outgrow what a preference may hold, and a damaged one is no picture", () => {
  const long = {
    ...setup,
    title: "x".repeat(200),
    parts: Array.from({ length: 64 }, (_, index) => ({ ...setup.parts[0], id: `P${index}` })),
  };
  for (const text of Object.values(withPicture({}, "long", long))) expect(String(text).length).toBeLessThan(1_000_000);
  expect(pictureOf({ "tray-picture odd": "{" }, "odd")).toBeNull();
});
