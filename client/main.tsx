import { render } from "preact";
import { App } from "./app.tsx";
import "./styles/tokens.css";
import "./styles/base.css";

const root = document.getElementById("page");
if (root !== null) render(<App />, root);
