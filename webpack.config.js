import { readFileSync } from "node:fs";
import CopyPlugin from "copy-webpack-plugin";
import { EsbuildPlugin } from "esbuild-loader";
import HtmlPlugin from "html-webpack-plugin";
import MiniCssExtractPlugin from "mini-css-extract-plugin";
import webpack from "webpack";
import { helpPage } from "./src/assets/help/build-help.mjs";
import { buildMetadata } from "./src/cli/metadata.mjs";

const DEVELOPMENT_URL = "https://localhost:3000/";
const VENDOR_SCRIPT = "https://appsforoffice.microsoft.com/lib/1/hosted/office.js";
const { version } = JSON.parse(readFileSync(new URL("package.json", import.meta.url), "utf8"));

/** Emits functions.json and the help page, both made from the comments of the sheet functions. */
class ContractPlugin {
  apply(compiler) {
    compiler.hooks.thisCompilation.tap("Contract", (compilation) => {
      const stage = webpack.Compilation.PROCESS_ASSETS_STAGE_ADDITIONAL;
      compilation.hooks.processAssets.tapPromise({ name: "Contract", stage }, async () => {
        const metadata = await buildMetadata({ baseUrl: DEVELOPMENT_URL });
        const { RawSource } = webpack.sources;
        compilation.emitAsset("functions.json", new RawSource(`${JSON.stringify(metadata, null, 1)}\n`));
        compilation.emitAsset("help/index.html", new RawSource(helpPage(metadata)));
      });
    });
  }
}

export default (env = {}, { mode = "production" } = {}) => {
  const selfHosted = Boolean(env.selfHosted);
  return {
    mode,
    // evaluated strings are what the embedded page's content security policy forbids
    devtool: mode === "production" ? false : "source-map",
    entry: {
      stub: "./src/embedded/office-stub.ts",
      functions: "./src/functions/register.ts",
      // opened by functions.js from its own folder
      worker: "./src/engine/worker.ts",
      // dependOn, not a shared runtime chunk: functions.js stays self-contained and the cache is one instance
      pane: { import: "./taskpane/main.ts", dependOn: "functions" },
      embedded: { import: "./src/embedded/page.ts", dependOn: "functions" },
    },
    output: {
      path: new URL("dist", import.meta.url).pathname,
      filename: "[name].js",
      chunkFilename: "grid/[name].js",
      clean: true,
    },
    resolve: { extensions: [".ts", ".js"] },
    module: {
      rules: [
        { test: /\.ts$/, loader: "esbuild-loader", options: { target: "es2022" } },
        { test: /\.css$/, use: [MiniCssExtractPlugin.loader, "css-loader"] },
      ],
    },
    optimization: {
      // webpack's own minifier takes more than a minute on the grid
      minimizer: [new EsbuildPlugin({ target: "es2022", css: true })],
    },
    performance: { hints: false },
    plugins: [
      new webpack.DefinePlugin({ COMOVE_VERSION: JSON.stringify(version) }),
      new MiniCssExtractPlugin({ filename: "[name].css" }),
      new HtmlPlugin({
        template: "./src/embedded/index.html",
        filename: "index.html",
        chunks: ["stub", "functions", "embedded"],
        chunksSortMode: "manual",
        scriptLoading: "defer",
        favicon: "./src/assets/icon-32.png",
      }),
      new HtmlPlugin({
        template: "./taskpane/pane.html",
        filename: "pane.html",
        chunks: ["functions", "pane"],
        chunksSortMode: "manual",
        scriptLoading: "defer",
        officeScript: selfHosted ? "office/office.js" : VENDOR_SCRIPT,
      }),
      new CopyPlugin({
        patterns: [
          { from: "src/assets/*.png", to: "assets/[name][ext]" },
          { from: "manifest.xml" },
          ...(selfHosted
            ? [{ from: "node_modules/@microsoft/office-js/dist", to: "office", info: { minimized: true } }]
            : []),
        ],
      }),
      new ContractPlugin(),
    ],
    stats: "errors-warnings",
  };
};
