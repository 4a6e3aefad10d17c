import { useEffect } from "react";
import type { Host } from "../shared-types/host";

/** The composition of the window. */
export function App({ host }: { readonly host: Host }) {
  useEffect(() => host.setTitle({ name: "New setup", handle: null, unsaved: false }), [host]);
  return <h1>Fieldtray</h1>;
}
