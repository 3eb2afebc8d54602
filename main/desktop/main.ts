import {
  app,
  BrowserWindow,
  dialog,
  ipcMain,
  Menu,
  MessageChannelMain,
  type MessagePortMain,
  protocol,
  session,
  utilityProcess,
} from "electron";
import { startEngineHost } from "../engine/process/engine-host";
import { createGrants } from "../engine/process/grants";
import type { ElectronMessagePortLike } from "../engine/process/message-port";
import { readPageFiles } from "../engine/process/page-files";
import { findPlaces } from "../engine/process/places";
import { choosePaths, type Dialogs } from "./dialogs";
import { portChannel } from "./handshake";
import { menuTemplate } from "./menu";
import { answerPage } from "./page-protocol";
import { sealContents, sealSession } from "./seal-window";
import { type UtilityProcessLike, utilityEngine } from "./utility-engine";
import { createWindowDoor, isOwnFrame } from "./window-door";
import { pageAddress, pageScheme, windowOptions } from "./window-options";

const places = findPlaces(import.meta.url);

async function openWindow(argumentPaths: readonly string[]): Promise<void> {
  const files = await readPageFiles(places.pageFolder);
  const grants = createGrants();
  const paths = await grants.grant(argumentPaths.length > 0 ? argumentPaths : [places.sampleStudy]);
  const fork = () => utilityProcess.fork(places.engineEntry, [], { serviceName: "Strake engine" });
  const engineHost = startEngineHost(utilityEngine(fork as unknown as () => UtilityProcessLike));

  protocol.handle(pageScheme, (request) => answerPage(files, request.method, request.url));
  sealSession(session.defaultSession as unknown as Parameters<typeof sealSession>[0]);
  const window = new BrowserWindow(windowOptions(places.preload));
  sealContents(window.webContents as unknown as Parameters<typeof sealContents>[0]);

  const dialogs: Dialogs = {
    open: (options) => dialog.showOpenDialog(window, options),
    save: (options) => dialog.showSaveDialog(window, options),
  };
  const door = createWindowDoor({
    engineHost,
    grants,
    paths,
    onAsk: (what) => choosePaths(dialogs, grants, what),
    makeChannel: () =>
      new MessageChannelMain() as unknown as { port1: ElectronMessagePortLike; port2: ElectronMessagePortLike },
  });
  ipcMain.on(portChannel, (event) => {
    if (!isOwnFrame(event.senderFrame)) return;
    window.webContents.postMessage(portChannel, null, [door.connect() as unknown as MessagePortMain]);
  });
  const openBy = (what: "data" | "folder") =>
    void choosePaths(dialogs, grants, what).then((opened) => opened.length > 0 && door.opened(opened));
  const actions = { openFiles: () => openBy("data"), openFolder: () => openBy("folder") };
  Menu.setApplicationMenu(Menu.buildFromTemplate(menuTemplate(actions, process.platform === "darwin")));

  window.once("ready-to-show", () => window.show());
  window.on("closed", () => void engineHost.close().finally(() => app.quit()));
  await window.loadURL(pageAddress);
}

app.enableSandbox();
protocol.registerSchemesAsPrivileged([
  { scheme: pageScheme, privileges: { standard: true, secure: true, supportFetchAPI: true } },
]);
// The window's own closing ends the engine first and then quits; without a listener Electron would quit at once.
app.on("window-all-closed", () => undefined);
app
  .whenReady()
  .then(() => openWindow(process.argv.slice(app.isPackaged ? 1 : 2)))
  .catch((error: unknown) => {
    console.error(error instanceof Error ? error.message : String(error));
    app.exit(1);
  });
