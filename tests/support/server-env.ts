/** Server tests do not depend on what stands in the developer's environment. */
for (const name of Object.keys(process.env)) {
  if (name === 'PORT' || name.startsWith('LANDFALL_')) delete process.env[name];
}
