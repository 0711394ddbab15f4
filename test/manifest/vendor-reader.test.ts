import { OfficeAddinManifest } from "office-addin-manifest";
import { expect, it } from "vitest";

it("the vendor's own reader finds the name, version and permissions in the manifest", async () => {
  const info = await OfficeAddinManifest.readManifestFile("manifest.xml");
  expect(info).toMatchObject({
    displayName: "Comove (development)",
    version: "0.1.0.0",
    permissions: "ReadWriteDocument",
  });
});
