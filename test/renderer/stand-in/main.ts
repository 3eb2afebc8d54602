import { memoryPortPair } from "../../../core/contract/memory-port";
import { serveEngine } from "../../../core/contract/server";
import { startApp } from "../../../renderer/start-app";
import { standInEngine } from "../stand-in-engine";

const root = document.getElementById("root");
const paths = new URLSearchParams(location.search).has("empty") ? [] : ["/made-up/basin.study.json"];
if (root) {
  startApp(root, {
    connect: async () => {
      const [page, engine] = memoryPortPair();
      setTimeout(() => serveEngine(standInEngine(), engine, { welcome: { door: "web", paths } }));
      return page;
    },
  });
}
