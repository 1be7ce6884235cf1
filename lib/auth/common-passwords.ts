// Made for this notebook from memory: runs on the keyboard, everyday words and their usual combinations.
// judgePassword also tries them without spaces, doubled and numbered at the end.
const words = `
000000 0123456789 01234567890 012345678901 0987654321 098765432109 102030405060 111111 112233 11223344
112233445566 121212 123123 123123123 123123123123 123321 123321123321 123456 1234567 12345678 123456789
1234567890 123456789012 1234567890123 12345678910 1234qwer 1234qwerasdf 1234qwerasdfzxcv 131313
147258369 147258369147 159357 159753 1a2b3c4d5e6f 1q2w3e4r5t6y 1q2w3e4r5t6y7u 1qaz2wsx3edc
1qaz2wsx3edc4rfv 222222 333333 444444 555555 666666 696969 741852963 777777 789456123 789456123000
888888 987654321 9876543210 987654321098 999999 a1b2c3d4 a1b2c3d4e5f6 aaaaaa aabbcc abc123 abc123abc123
abcabc abcd1234 abcd1234abcd abcdefgh abcdefghij abcdefghijkl abcdefghijklm abcdefghijklmnop access
accesscode accessgranted admin admin123 adminadmin administrator administrators adminpassword alexander
alexandra amanda amazing america andrew android angel angels anna anthony anything apple apple123 april
arsenal asdasd asdasdasd asdf1234 asdf1234asdf asdfasdf asdfasdfasdf asdfghjkl asdfghjklzxcvbnm asdfqwer
ashley august australia autumn awesome azertyuiop babyboy babygirl banana barcelona baseball basketball
basketballs batman bear beautiful berlin bestfriend bestfriends black blackblack blessed blessing blue
blueblue boston brazil brother business butterfly california canada cat catdog cats changeme changemenow
changemeplease changethis charlie cheese chelsea chemist chemistry cherry chicago china chocolate
christopher coffee coffeecoffee college colour company companyname companypassword computer computers
contrasena cookie cookies correcthorse correcthorsebattery correcthorsebatterystaple corvette cosmetic
cosmetics cowboys cream creams cricket cupcake cutie dancer dancing daniel darling david december
default defaultpassword demo demodemo demopassword deutschland devil diamond diamonds dog dogs dolphin
donotforget donttouch dragon dragondragon drummer eagle eagles elizabeth emulsion emulsions england
espana everything faith falcon family familyfirst fantastic father february ferrari flower flowerpower
flowers football footballfootball forever forgetit forgotpassword formulator fortnite france freedom
friday fridayfriday friends friendsforever george germany ginger goaway godisgood godislove gold golden
golf golfer goodbye goodluck goodmorning goodnight google green guest guestguest guitar handsome hannah
happy happyday happyhappy harley harleydavidson haslo heaven hello hellothere helloworld hockey honda
honey honeybee horse horsebatterystaple hunter iamtheboss idontknow idontknowit iforgot iforgotit
ihatepassword ihatepasswords ilovemycat ilovemydog ilovemyfamily ilovemymom iloveyou iloveyouforever
iloveyousomuch iloveyouu india internet iphone ironman istanbul italia jackpot james january jennifer
jessica jesus jesuschrist jesusislord john jordan joshua july june juventus keepout killer king kingkong
kitten kitty lablab laboratorium laboratory labpassword labtech lakers laptop letmein letmeinnow
letmeinplease liberty lion liverpool lkjhgfdsa login loginlogin loginpassword london londonlondon
losenord lotion lovelove lovelovelove lovely loveyou loveyouforever lucky lucky777 manager
managermanager manchester manchesterunited march maria master matrix matthew may mercedes merlin mexico
michael microsoft million millionaire minecraft mnbvcxz mnbvcxzlkjhgfdsa monday money moneymoney monkey
monkeymonkey motdepasse mother music mustang mylab mylove mylovely mypass mypassphrase mypassword
mypassword1 mypasswordis mysecret mysecretpassword naruto newpassword newyork newyorkcity nicole ninja
nopassword nopasswordneeded notebook nothing november october office officeoffice oldpassword opensesame
opensesameopen openup orange p4ssword p@ssw0rd p@ssword pa55w0rd pa55word panther paris parola passpass
passpasspass passphrase passw0rd passwd password password!123 password1 password12 password123
password1234 password12345 password123456 password1234567 passwordone passwordpass passwordpassword
passwort passwort123 passwrd peanut peanutbutter pepper perfect phoenix piano pizza platinum
pleasechange poiuytrewq pokemon poland porsche pretty prince princess princessa puppy purple
q1w2e3r4t5y6 q1w2e3r4t5y6u7 qazwsxedc qazwsxedcrfv qazwsxedcrfvtgb quality qualityassurance queen
qweasdzxc qweasdzxc123 qweqwe qweqweqwe qwerasdf qwerasdfzxcv qwerty qwerty123 qwerty1234 qwerty12345
qwerty123456 qwerty123456789 qwertyuiop qwertyuiopasdf qwertzuiop rabbit rainbow rainbowrainbow rangers
realmadrid redred rememberme remembermeplease robert root rootroot rugby russia salasana samantha
samsung samurai saturday school science scientist secret secretsecret senha september sexy shadow shark
signin silver sister soccer something sophie spider spiderman spring springtime stability starwars
steelers stephanie stillstand stillstandlab stillstandstillstand strawberry student sugar summer
summer2024 summer2025 summer2026 summertime sunday sunshine sunshines sunshinesunshine superman
supersecret supersecretpassword superuser sweetheart swimming sydney system systemadmin teacher
technician temp temporary temppassword tennis test testing testpassword testtest testtesttest texas
thankyou thankyouverymuch thelab thepassword thisisapassword thisismypassword thisisthepassword thomas
thursday tiger toor topsecret toronto toyota trustno1 trustnoone tuesday turtle ukraine university user
username usernamepassword useruser victoria viscosity volleyball wachtwoord warrior wednesday welcome
welcometo whatever white william windows windows10 winter wintertime wizard wolf wonderful work worker
workwork yamaha yankees yellow yourpassword zaq12wsxcde3 zxcvasdfqwer zxcvbnm zxcvbnmasdfghjkl zxczxc
zxczxczxc
`

export const commonPasswords: ReadonlySet<string> = new Set(words.trim().split(/\s+/))
