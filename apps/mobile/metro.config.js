const { getDefaultConfig } = require('expo/metro-config');

const config = getDefaultConfig(__dirname);

/**
 * Parts of packages that nothing here uses and every visit would pay for: imports of them find an empty module.
 * @type {{ in: RegExp, of: RegExp, only?: string }[]}
 */
const LEFT_OUT = [
  // zod's messages in fifty languages: ours are written in our own words.
  { in: /[\\/]zod[\\/]/, of: /^\.\.?\/locales\/index\.(js|cjs)$/ },
  // zod's JSON Schema, which the server alone writes, and its compiler, which the page's content policy forbids.
  {
    in: /[\\/]zod[\\/]v4[\\/]/,
    of: /\/((to|from)-json-schema|json-schema-(processors|generator)|compile)\.(js|cjs)$/,
  },
  // Windowed lists of react-native-web. A list here is short, or a table; a lint rule keeps them from being asked for.
  {
    in: /[\\/]react-native-web[\\/]/,
    of: /\/(FlatList|SectionList|VirtualizedList|VirtualizedSectionList)$/,
    only: 'web',
  },
  // The router's own tab bar: ours is written here. The same lint rule keeps its tabs from being asked for.
  {
    in: /[\\/]expo-router[\\/]build[\\/]react-navigation[\\/]bottom-tabs[\\/]/,
    of: /\/views\/(BottomTabBar|BottomTabView)$/,
    only: 'web',
  },
];

config.resolver.resolveRequest = (context, moduleName, platform) =>
  LEFT_OUT.some(
    (part) =>
      part.of.test(moduleName) &&
      part.in.test(context.originModulePath) &&
      (part.only === undefined || part.only === platform),
  )
    ? { type: 'empty' }
    : context.resolveRequest(context, moduleName, platform);

module.exports = config;
