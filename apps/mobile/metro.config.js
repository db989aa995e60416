const { getDefaultConfig } = require('expo/metro-config');

const config = getDefaultConfig(__dirname);

// zod carries its messages in fifty languages; ours are written in our own words, so they stay out.
const ZOD_LOCALES = /^\.\.?\/locales\/index\.(js|cjs)$/;

config.resolver.resolveRequest = (context, moduleName, platform) =>
  ZOD_LOCALES.test(moduleName) && /[\\/]zod[\\/]/.test(context.originModulePath)
    ? { type: 'empty' }
    : context.resolveRequest(context, moduleName, platform);

module.exports = config;
