import webpack from "webpack";
import configure from "../../webpack.config.js";

/**
 * Runs webpack once into dist/.
 * @param {{ mode: "production" | "development", selfHosted?: boolean }} how
 * @returns {Promise<string>} what went wrong, or nothing
 */
export function build({ mode, selfHosted = false }) {
  return new Promise((resolve, reject) => {
    webpack(configure({ selfHosted }, { mode }), (fault, stats) => {
      if (fault || !stats) return reject(fault ?? new Error("webpack ended without a word"));
      const sound = !stats.hasErrors() && !stats.hasWarnings();
      resolve(sound ? "" : stats.toString({ preset: "errors-warnings", colors: false }));
    });
  });
}
