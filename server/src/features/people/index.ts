export { createPeopleRepository, type PeopleRepository, type StoredPerson } from './people.repository';
export { peopleRoutes } from './people.routes';
export { createPeopleService, type PeopleService } from './people.service';
export { hashPassword } from './secrets';
