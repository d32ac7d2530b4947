import { app, BrowserWindow, dialog, ipcMain, protocol, session, type IpcMainInvokeEvent } from 'electron';
import { mkdirSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { EngineClient, type StartEngine } from '../engine-client.ts';
import { defaultNotebook, homeFolder } from '../home.ts';
import type { ShellCommand } from '../../contract/bridge.ts';
import { readPage } from '../pages.ts';
import { setMenu } from './menu.ts';
import { NotebookChoice } from './notebook-choice.ts';
import { notebookNamed } from './starting-notebook.ts';
import { createWindow } from './window.ts';

const scheme = 'holdfast-app';
const origin = `${scheme}://window`;
/** How long a last save may take when the window closes or another notebook takes its place. */
const lastWord_ms = 1500;
/** Ample for a message to the page and its answer's way back. */
const messageTrip_ms = 200;

/** The whole Electron application, but for how its engine is started. */
export function startApp(engineAt: (enginePath: string) => StartEngine): void {
  // Before 'ready'. The page gets an origin of its own, so that modules, fetch and storage work as on the web, and
  // file:// is never used.
  protocol.registerSchemesAsPrivileged([
    { scheme, privileges: { standard: true, secure: true, supportFetchAPI: true, codeCache: true } },
  ]);
  if (process.env['HOLDFAST_HOME'] && !app.commandLine.hasSwitch('user-data-dir')) {
    app.setPath('userData', join(homeFolder(), 'window'));
  }
  if (!app.requestSingleInstanceLock()) {
    // The first instance has been told; it shows the notebook.
    tellStarter();
    app.quit();
    return;
  }

  let named = notebookNamed(process.argv, process.cwd());
  let show: (notebook: string | null) => void = (notebook) => (named = notebook ?? named);
  // On macOS the Finder's double click comes this way, possibly before 'ready'.
  app.on('open-file', (event, path) => {
    event.preventDefault();
    show(path);
  });
  app.on('second-instance', (_event, words, workingFolder) => show(notebookNamed(words, workingFolder)));
  app.on('window-all-closed', () => app.quit());
  app.on('web-contents-created', (_event, contents) => {
    contents.setWindowOpenHandler(() => ({ action: 'deny' }));
    contents.on('will-navigate', (event) => event.preventDefault());
    contents.on('will-attach-webview', (event) => event.preventDefault());
  });

  void app.whenReady().then(async () => {
    limitSession();
    const notebook = named ?? defaultNotebook();
    if (named === null) mkdirSync(dirname(notebook), { recursive: true });
    mkdirSync(app.getPath('userData'), { recursive: true });
    const client = new EngineClient(engineAt(join(__dirname, 'engine.cjs')), notebook);
    const choice = new NotebookChoice();
    choice.allow(notebook);
    stopInOrder(client);

    const window = createWindow(join(__dirname, 'preload.cjs'), app.getPath('userData'));
    const toPage = (channel: string, message: unknown): void => {
      if (!window.isDestroyed()) window.webContents.send(channel, message);
    };
    setMenu((command) => toPage('command', command));
    client.onEvent((event) => toPage('event', event));
    answerPage(window, client, choice);
    show = (path) => void showNotebook(window, client, choice, path);

    window.once('show', tellStarter);
    await window.loadURL(`${origin}/`);
  });
}

/** The page comes from the built folder and nowhere else, and gets no permission to anything. */
function limitSession(): void {
  session.defaultSession.setPermissionRequestHandler((_contents, _permission, decide) => decide(false));
  session.defaultSession.setPermissionCheckHandler(() => false);
  session.defaultSession.on('will-download', (_event, item) => {
    item.setSaveDialogOptions({ defaultPath: join(app.getPath('downloads'), item.getFilename()) });
  });
  protocol.handle(scheme, async (request) => {
    const page = await readPage(join(__dirname, '../renderer'), new URL(request.url).pathname);
    return new Response(page.body, { status: page.status, headers: page.headers });
  });
}

function answerPage(window: BrowserWindow, client: EngineClient, choice: NotebookChoice): void {
  function check(event: IpcMainInvokeEvent): void {
    const frame = event.senderFrame;
    const isPage = event.sender === window.webContents && frame?.parent === null && frame.url.startsWith(`${origin}/`);
    if (!isPage) throw new Error('a message from somewhere else than the page');
  }
  ipcMain.handle('ask', async (event, name: unknown, question: unknown) => {
    check(event);
    const asked = String(name);
    const refusal = choice.refusal(asked, question);
    if (refusal) return refusal;
    const answer = await client.relay(asked, question);
    choice.learn(asked, answer);
    return answer;
  });
  ipcMain.handle('choose notebook', (event, what: unknown, suggestion: unknown) => {
    check(event);
    return choice.choose(window, what === 'save' ? 'save' : 'open', String(suggestion));
  });
}

/** Brings the window to the front, with another notebook in it where one is named. */
async function showNotebook(
  window: BrowserWindow,
  client: EngineClient,
  choice: NotebookChoice,
  path: string | null,
): Promise<void> {
  if (window.isMinimized()) window.restore();
  window.focus();
  if (path === null) return;
  // What was typed within the last moment belongs to the notebook that is open now.
  window.webContents.send('command', 'keep draft' satisfies ShellCommand);
  await new Promise((resolve) => setTimeout(resolve, messageTrip_ms));
  await client.quiet(lastWord_ms);
  const answer = await client.ask('notebook open', { path });
  if (answer.ok) {
    choice.allow(answer.value.path);
    window.webContents.reload();
    return;
  }
  const words = 'refusals' in answer ? answer.refusals.map((no) => `${no.value}: ${no.remedy}`) : [answer.fault];
  await dialog.showMessageBox(window, { type: 'warning', message: `${path} did not open`, detail: words.join('\n') });
}

/** Quits once the engine has answered what the closing page last asked, such as to keep a draft. */
function stopInOrder(client: EngineClient): void {
  app.on('will-quit', (event) => {
    event.preventDefault();
    void client.quiet(lastWord_ms).then(async () => {
      await client.stop();
      // Not quit: one that was held up before is not taken up again in every case.
      app.exit();
    });
  });
}

/** scripts/start.mjs waits for this file to know that a window is there. */
function tellStarter(): void {
  const file = process.env['HOLDFAST_READY_FILE'];
  if (file) writeFileSync(file, '');
}
