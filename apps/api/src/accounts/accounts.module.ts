/** People, organisations and sessions. */
import { Module } from '@nestjs/common';
import { JwtModule } from '@nestjs/jwt';
import { MailModule } from '../mail/mail.module.js';
import { AccessTokenStrategy } from './access-token.strategy.js';
import { AccessTokens } from './access-tokens.js';
import { AuthController } from './auth.controller.js';
import { MailedLinksService } from './mailed-links.service.js';
import { MarketplaceStarter } from './marketplace.starter.js';
import { OrganisationController } from './organisation.controller.js';
import { OrganisationService } from './organisation.service.js';
import { OrganisationsRepository } from './organisations.repository.js';
import { PasswordHasher } from './password-hasher.js';
import { PeopleRepository } from './people.repository.js';
import { SecondFactorController } from './second-factor.controller.js';
import { SecondFactorService } from './second-factor.service.js';
import { SessionCookies } from './session-cookies.js';
import { SessionsRepository } from './sessions.repository.js';
import { SessionsService } from './sessions.service.js';
import { SignUpService } from './sign-up.service.js';

@Module({
  imports: [MailModule, JwtModule.register({})],
  controllers: [AuthController, OrganisationController, SecondFactorController],
  providers: [
    AccessTokens,
    AccessTokenStrategy,
    MailedLinksService,
    MarketplaceStarter,
    OrganisationService,
    OrganisationsRepository,
    PasswordHasher,
    PeopleRepository,
    SecondFactorService,
    SessionCookies,
    SessionsRepository,
    SessionsService,
    SignUpService,
  ],
  exports: [SecondFactorService, OrganisationService, OrganisationsRepository],
})
export class AccountsModule {}
