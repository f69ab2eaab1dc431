/** What we use of the Parquet library. The build keeps it in a file of its own, loaded when a table is written or read. */
export { parquetMetadataAsync } from 'hyparquet';
export { parquetHeader } from 'hyparquet/src/column.js';
export { readRleBitPackedHybrid } from 'hyparquet/src/encoding.js';
export { parquetReadColumn } from 'hyparquet/src/read.js';
export { snappyUncompress } from 'hyparquet/src/snappy.js';
export { ByteWriter, ParquetWriter } from 'hyparquet-writer';
export { writeColumn } from 'hyparquet-writer/src/column.js';
export { writePageHeader } from 'hyparquet-writer/src/datapage.js';
export { writeRleBitPackedHybrid } from 'hyparquet-writer/src/encoding.js';
export { snappyCompress } from 'hyparquet-writer/src/snappy.js';
