export { dimensions, type Dimension } from './dimensions';
export { parseQuantity, unitsOf, factorOf, type ParsedQuantity } from './parse';
export { formatQuantity, formatDb, type FormatOptions } from './format';
