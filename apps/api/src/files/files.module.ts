/** Files that features attach to their own things. Global, since most features do. */
import { join } from 'node:path';
import { Global, Module } from '@nestjs/common';
import { DiskStoreAdapter } from '../adapters/files/disk-store.adapter.js';
import { JobsModule } from '../jobs/jobs.module.js';
import { CONFIG, type Config } from '../platform/config.js';
import { FileAccess } from './file-access.js';
import { FILE_STORE, type FileStorePort } from './file-store.port.js';
import { FilesController } from './files.controller.js';
import { FilesRepository } from './files.repository.js';
import { FilesService } from './files.service.js';

const storeFor = ({ dataDir }: Config): FileStorePort => new DiskStoreAdapter(join(dataDir, 'files'));

@Global()
@Module({
  imports: [JobsModule],
  controllers: [FilesController],
  providers: [
    { provide: FILE_STORE, inject: [CONFIG], useFactory: storeFor },
    FileAccess,
    FilesRepository,
    FilesService,
  ],
  exports: [FileAccess, FilesService],
})
export class FilesModule {}
