import { existsSync, readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { validateXML } from "xmllint-wasm";
import { productionManifest } from "../../src/cli/manifest.mjs";

/**
 * The vendor's published schemas. They are not ours to hand out, so they lie outside the project, and whoever
 * has no copy still gets all other tests.
 */
const schemas = new URL("../../../shared/schemas/", import.meta.url);
const present = existsSync(schemas);
const manifest = readFileSync(new URL("../../manifest.xml", import.meta.url), "utf8");

const schema = (fileName: string) => ({
  fileName,
  contents: readFileSync(new URL(fileName, schemas), "utf8"),
});

async function faultsIn(xml: string): Promise<string[]> {
  const { errors } = await validateXML({
    xml: { fileName: "manifest.xml", contents: xml },
    schema: schema("OfficeAppManifestV1_1.xsd"),
    preload: [schema("OfficeAppBasicTypesV1_0.xsd"), schema("TaskPaneAppVersionOverridesV1_0.xsd")],
  });
  return errors.map(({ message }) => message);
}

if (!present)
  console.warn("The manifest was NOT checked against the vendor's schemas: they are not on this machine.");

it("the vendor's schemas are there wherever nothing may be left out", () =>
  expect(present || process.env["COMOVE_CI"] !== "1").toBe(true));

describe.skipIf(!present)("the vendor's schemas", () => {
  it("accept the development manifest", async () => expect(await faultsIn(manifest)).toEqual([]));

  it("accept the production manifest", async () =>
    expect(await faultsIn(productionManifest(manifest, "https://example.org/a&b/"))).toEqual([]));

  it("refuse a manifest whose elements change places", async () => {
    const moved = manifest.replace(/(<Version>.*<\/Version>)\s*(<ProviderName>.*<\/ProviderName>)/, "$2$1");
    expect(moved).not.toBe(manifest);
    expect(await faultsIn(moved)).not.toEqual([]);
  });

  it("refuse a manifest without a name", async () =>
    expect(await faultsIn(manifest.replace(/<DisplayName .*\/>/, ""))).not.toEqual([]));
});
