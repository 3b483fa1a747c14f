/** The page's start. */
import { render } from "preact";
import { Page } from "./page.tsx";

render(<Page />, document.getElementById("page")!);
