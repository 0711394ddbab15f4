import { readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import CopyPlugin from "copy-webpack-plugin";
import { EsbuildPlugin } from "esbuild-loader";
import HtmlPlugin from "html-webpack-plugin";
import MiniCssExtractPlugin from "mini-css-extract-plugin";
import webpack from "webpack";
import { helpPage } from "./src/assets/help/build-help.mjs";
import { licences } from "./src/cli/licences.mjs";
import { buildMetadata, DEVELOPMENT_URL } from "./src/cli/metadata.mjs";

const VENDOR_SCRIPT = "https://appsforoffice.microsoft.com/lib/1/hosted/office.js";
const { version } = JSON.parse(readFileSync(new URL("package.json", import.meta.url), "utf8"));

/**
 * Adds made files to a build. What goes wrong while they are made is an error of the build, told in its words.
 * @param {import("webpack").Compilation} compilation
 * @param {() => Record<string, string> | Promise<Record<string, string>>} make  texts by file name
 */
function emitMade(compilation, make) {
  const stage = webpack.Compilation.PROCESS_ASSETS_STAGE_ADDITIONAL;
  compilation.hooks.processAssets.tapPromise({ name: "Made", stage }, async () => {
    try {
      for (const [name, text] of Object.entries(await make())) {
        compilation.emitAsset(name, new webpack.sources.RawSource(text));
      }
    } catch (fault) {
      compilation.errors.push(
        new webpack.WebpackError(fault instanceof Error ? fault.message : String(fault)),
      );
    }
  });
}

/** Emits functions.json and the help page, both made from the comments of the sheet functions. */
class ContractPlugin {
  /** @param {import("webpack").Compiler} compiler */
  apply(compiler) {
    compiler.hooks.thisCompilation.tap("Contract", (compilation) =>
      emitMade(compilation, async () => {
        const metadata = await buildMetadata({ baseUrl: DEVELOPMENT_URL });
        return {
          "functions.json": `${JSON.stringify(metadata, null, 1)}\n`,
          "help/index.html": helpPage(metadata),
        };
      }),
    );
  }
}

/** Emits licences.txt for everything that ends up in the scripts. */
class LicencesPlugin {
  /** @param {import("webpack").Compiler} compiler */
  apply(compiler) {
    compiler.hooks.thisCompilation.tap("Licences", (compilation) => {
      /** @type {string[]} */
      let files = [];
      compilation.hooks.finishModules.tap("Licences", (modules) => {
        files = [...modules].flatMap((module) => module.nameForCondition() ?? []);
      });
      emitMade(compilation, () => ({ "licences.txt": licences(files) }));
    });
  }
}

/**
 * The vendor's library for closed networks, each file as it is. It picks by itself what the host at hand needs; only
 * what is for other programs or for debugging stays away.
 */
const VENDOR_PACKAGE = "node_modules/@microsoft/office-js";
const vendorFiles = [
  {
    context: `${VENDOR_PACKAGE}/dist`,
    from: "**/*",
    to: "office/",
    info: { minimized: true },
    globOptions: {
      ignore: [
        "**/*.debug*.js",
        "**/*.d.ts",
        "**/*vsdoc.js",
        "**/{access,onenote,outlook,powerpoint,project,word}*.js",
      ],
    },
  },
  { from: `${VENDOR_PACKAGE}/LICENSE.md`, to: "office/LICENSE.md" },
];

/**
 * The grid can break words of seventy languages at the end of a line and brings the patterns for it, five megabytes.
 * Cells never ask for them, so none is built in.
 */
const withoutWordBreaks = new webpack.NormalModuleReplacementPlugin(
  /^\.\/[a-z][a-z\d-]*-[\w-]{8}\.js$/,
  (request) => {
    if (/@univerjs[\\/]engine-render[\\/]/.test(request.context))
      request.request = "data:text/javascript,export {}";
  },
);

/**
 * @param {{ selfHosted?: boolean }} [env]
 * @param {{ mode?: "production" | "development" }} [argv]
 * @returns {import("webpack").Configuration}
 */
export default (env = {}, { mode = "production" } = {}) => {
  const selfHosted = Boolean(env.selfHosted);
  return {
    mode,
    context: fileURLToPath(new URL(".", import.meta.url)),
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
      path: fileURLToPath(new URL("dist", import.meta.url)),
      filename: "[name].js",
      clean: true,
    },
    resolve: { extensions: [".ts", ".js"] },
    // webpack's own way to the global object evaluates a string where it knows no other
    node: { global: false },
    module: {
      // every page is the scripts that it names and no more
      parser: { javascript: { dynamicImportMode: "eager" } },
      rules: [
        { test: /\.ts$/, loader: "esbuild-loader", options: { target: "es2022" } },
        { test: /\.css$/, use: [MiniCssExtractPlugin.loader, "css-loader"] },
      ],
    },
    optimization: {
      // webpack's own minifier takes more than a minute on the grid
      minimizer: [new EsbuildPlugin({ target: "es2022", css: true, legalComments: "eof" })],
    },
    performance: { hints: false },
    plugins: [
      withoutWordBreaks,
      new webpack.DefinePlugin({ COMOVE_VERSION: JSON.stringify(version), global: "globalThis" }),
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
          ...(selfHosted ? vendorFiles : []),
        ],
      }),
      new ContractPlugin(),
      new LicencesPlugin(),
    ],
    stats: "errors-warnings",
  };
};
