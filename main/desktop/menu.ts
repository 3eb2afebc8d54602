import type { MenuItemConstructorOptions } from "electron";

export interface MenuActions {
  openFiles(): void;
  openFolder(): void;
}

/** The application's menu. Undo and redo are the page's own and are not listed, lest the window's text undo take their keys. */
export function menuTemplate(actions: MenuActions, isMac: boolean): MenuItemConstructorOptions[] {
  return [
    ...(isMac ? [{ role: "appMenu" } as const] : []),
    {
      label: "File",
      submenu: [
        { label: "Open…", accelerator: "CmdOrCtrl+O", click: () => actions.openFiles() },
        { label: "Open folder…", accelerator: "CmdOrCtrl+Shift+O", click: () => actions.openFolder() },
        { type: "separator" },
        isMac ? { role: "close" } : { role: "quit" },
      ],
    },
    { label: "Edit", submenu: [{ role: "cut" }, { role: "copy" }, { role: "paste" }, { role: "selectAll" }] },
    {
      label: "View",
      submenu: [
        { role: "reload" },
        { type: "separator" },
        { role: "resetZoom" },
        { role: "zoomIn" },
        { role: "zoomOut" },
        { role: "togglefullscreen" },
      ],
    },
  ];
}
