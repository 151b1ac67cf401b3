import { StrictMode } from "react";
import { createRoot } from "react-dom/client";
import "./tokens.css";
import "./page.css";
import { declareFaces } from "./faces.ts";
import { Page } from "./page.tsx";

const root = document.getElementById("page");
if (root === null) throw new Error("main: expected an element #page in index.html, got none");
declareFaces(document);
createRoot(root).render(
  <StrictMode>
    <Page />
  </StrictMode>,
);
