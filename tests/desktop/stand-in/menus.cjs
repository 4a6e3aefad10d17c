const { app } = require("./application.cjs");

/** Menus as data: a test clicks an item, and keys that the page left alone find the item that they belong to. */
class Menu {
  static current = null;
  constructor(items) {
    this.items = items;
  }
  static buildFromTemplate(template) {
    return new Menu(
      template.map((entry) => {
        if (entry.submenu === undefined) return { ...entry };
        return { ...entry, submenu: Menu.buildFromTemplate(entry.submenu) };
      }),
    );
  }
  static setApplicationMenu(menu) {
    Menu.current = menu;
  }
  static getApplicationMenu() {
    return Menu.current;
  }
  getMenuItemById(id) {
    for (const item of this.items) {
      const found = item.id === id ? item : item.submenu?.getMenuItemById(id);
      if (found) return found;
    }
    return null;
  }
  all() {
    return this.items.flatMap((item) => [item, ...(item.submenu?.all() ?? [])]);
  }
}

function belongsTo(accelerator, { key, ctrlKey, shiftKey, altKey }) {
  const parts = accelerator.split("+");
  const name = parts.at(-1) === "Plus" ? "+" : parts.at(-1);
  return (
    name.toLowerCase() === key.toLowerCase() &&
    ctrlKey === parts.includes("CmdOrCtrl") &&
    shiftKey === parts.includes("Shift") &&
    altKey === parts.includes("Alt")
  );
}

app.on("stand-in-key", (pressed) => {
  const item = Menu.current?.all().find(({ accelerator, registerAccelerator, click }) => {
    return accelerator !== undefined && registerAccelerator !== false && click !== undefined && belongsTo(accelerator, pressed);
  });
  item?.click();
});

module.exports = { Menu };
