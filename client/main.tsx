// The ground first, so that each component's own file comes after it and wins.
import "./styles/tokens.css";
import "./styles/base.css";
import { render } from "preact";
import { App } from "./app.tsx";

const root = document.getElementById("page");
if (root !== null) render(<App />, root);
