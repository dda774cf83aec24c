import { Controller, Get, HttpCode, Param, Post, Query, StreamableFile, UploadedFile } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import type { SetUpWorkbookView } from '@app/contracts';
import { Permit } from '../access/permit';
import { CurrentPerson, type Person } from '../auth/current-person';
import { uploadedFile, WorkbookUpload } from '../intakes/workbook-upload';
import { IdPipe } from '../platform/id.pipe';
import { ConfirmQueryDto } from './dto/confirm-query.dto';
import { SetUpWorkbookService } from './set-up-workbook.service';

const XLSX = 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet';

@ApiTags('set-up')
@Controller('plants/:id/set-up/workbook')
export class SetUpWorkbookController {
  constructor(private readonly workbooks: SetUpWorkbookService) {}

  /** The whole set-up; of a new plant the empty sheets with what each column wants. */
  @Get()
  @Permit('set_up_plant')
  async download(@CurrentPerson() person: Person, @Param('id', IdPipe) plantId: number): Promise<StreamableFile> {
    const { fileName, bytes } = await this.workbooks.download(person, plantId);
    return new StreamableFile(bytes, {
      type: XLSX,
      disposition: `attachment; filename*=UTF-8''${encodeURIComponent(fileName)}`,
    });
  }

  @Post()
  @Permit('set_up_plant')
  @WorkbookUpload()
  @HttpCode(200)
  upload(
    @CurrentPerson() person: Person,
    @Param('id', IdPipe) plantId: number,
    @Query() { confirm }: ConfirmQueryDto,
    @UploadedFile() file?: Express.Multer.File,
  ): Promise<SetUpWorkbookView> {
    return this.workbooks.upload(person, plantId, uploadedFile(file), confirm === 'yes');
  }
}
