/** The policy that the window server sends with every page. */
export const POLICY: string;

export interface WindowServer {
  readonly address: string;
  readonly port: number;
  readonly windows: {
    readonly count: () => number;
    readonly await: (file: { readonly name: string; readonly text: string } | { readonly refused: string }) => void;
    readonly came: (withinMs: number) => Promise<void>;
    readonly gone: () => Promise<void>;
  };
  readonly stop: () => Promise<void>;
}

export function serveWindow(folder: string, storeFolder: string, port?: number): Promise<WindowServer>;
