import { chooseDoor } from "./bridge/choose-door";
import { startApp } from "./start-app";

const root = document.getElementById("root");
if (root) startApp(root, chooseDoor());
