import "./host/without-eval";
import { StrictMode } from "react";
import { createRoot } from "react-dom/client";
import { version } from "../package.json";
import { App } from "./app";
import { findHost } from "./host/find-host";

const place = document.getElementById("root");
if (place === null) throw new Error("the page has no place for the window");
createRoot(place).render(
  <StrictMode>
    <App host={findHost(window, version)} />
  </StrictMode>,
);
